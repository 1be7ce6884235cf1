import { expect, test as base, type BrowserContext } from '@playwright/test'

// Every browser test is also one of A07: what a page may not do is collected while it runs and fails the test.

export type Watch = {
  /** A refusal that this test provokes: what the browser says of it on the console is no error. */
  expectRefusal: (address: RegExp, status: number) => void
  /** The network is taken away, so requests that fail are what is tried. */
  expectNoNetwork: () => void
  /** Also for a second browser that this test opens. */
  over: (context: BrowserContext) => Promise<void>
}

export const test = base.extend<{ watch: Watch }>({
  watch: [
    async ({ context, baseURL }, use) => {
      const problems: string[] = []
      const refusals: { address: RegExp; status: number }[] = []
      let isCut = false
      const isExpected = (text: string, address: string) =>
        (isCut && /net::ERR_(INTERNET_DISCONNECTED|PROXY_CONNECTION_FAILED)/.test(text)) ||
        refusals.some((one) => text.includes(`status of ${one.status} `) && one.address.test(address))

      const over = async (watched: BrowserContext) => {
        // The browser tells of a breach on the console too, but not of every kind.
        await watched.addInitScript(() =>
          document.addEventListener('securitypolicyviolation', (event) =>
            console.error(
              `content security policy: ${event.violatedDirective} refuses ${event.blockedURI} in ${event.sourceFile}:${event.lineNumber}:${event.columnNumber}`,
            ),
          ),
        )
        watched.on('console', (message) => {
          const { url } = message.location()
          if (message.type() === 'error' && !isExpected(message.text(), url))
            problems.push(`console: ${message.text()} (${url})`)
        })
        watched.on('weberror', (error) => problems.push(`uncaught: ${error.error().stack}`))
        watched.on('request', (request) => {
          const { protocol, origin } = new URL(request.url())
          if (protocol.startsWith('http') && origin !== baseURL) problems.push(`request to ${request.url()}`)
        })
      }

      await over(context)
      await use({
        over,
        expectRefusal: (address, status) => void refusals.push({ address, status }),
        expectNoNetwork: () => {
          isCut = true
        },
      })
      expect(problems).toEqual([])
    },
    { auto: true },
  ],
})

export { expect }
