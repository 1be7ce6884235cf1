import type { Locator } from '@playwright/test'

// The keystroke-level model of Card, Moran and Newell (Communications of the ACM 23, 1980, 396-410): seconds of an
// experienced person. A form is typed at the pace of an average typist, each new target is looked for and pointed at.
const keySeconds = 0.28
const pointSeconds = 1.1
const pressSeconds = 0.2
const thinkSeconds = 1.35
const homeSeconds = 0.4

/** Does what a hand does, and counts the seconds it would take; waiting for the server is not counted. */
export class Hand {
  seconds = 0

  async press(target: Locator) {
    this.seconds += thinkSeconds + pointSeconds + pressSeconds
    await target.click()
  }

  /** The field is reached by Tab or Enter, as forms here go on by themselves. */
  async type(field: Locator, text: string) {
    this.seconds += thinkSeconds + keySeconds * (text.length + 1)
    await field.fill(text)
  }

  /** A list is reached by Tab and answered by the first letters of what is wanted. */
  async choose(list: Locator, option: Parameters<Locator['selectOption']>[0]) {
    this.seconds += thinkSeconds + 4 * keySeconds
    await list.selectOption(option)
  }

  async enter(field: Locator) {
    this.seconds += keySeconds
    await field.press('Enter')
  }

  /** As Ctrl V does it; the clipboard itself belongs to whoever runs the test. */
  async paste(field: Locator, text: string) {
    this.seconds += thinkSeconds + pointSeconds + homeSeconds + 2 * keySeconds
    await field.evaluate((element, data) => {
      element.focus()
      const clipboardData = new DataTransfer()
      clipboardData.setData('text/plain', data)
      element.dispatchEvent(new ClipboardEvent('paste', { clipboardData, bubbles: true, cancelable: true }))
    }, text)
  }
}
