import { pressIn } from '../people'
import { expect, test } from '../watch'

test('The story, formulator: reads sheet and curves, and answers a flag with its cause and what is done', async ({
  page,
}) => {
  await pressIn(page, 'liv')
  await page.getByRole('link', { name: 'S-004', exact: true }).click()
  await expect(page).toHaveURL(/\/studies\/S-004$/)
  await expect(page.getByRole('heading', { level: 1 })).toContainText(/at 45.°C from week \d/)
  const sheet = page.getByRole('grid', { name: 'Sheet of S-004, batch N86-1' })
  await sheet.getByRole('button', { name: /^45 °C, week 8 .*separation \d+\.\d %/ }).click()
  const strip = page.getByRole('group', { name: /^Jar 45/ })
  await expect(strip.getByText(/^week 8, /)).toBeVisible()
  for (const name of ['Separation', 'Look', 'pH', 'Viscosity']) await expect(strip).toContainText(name)

  await page.getByRole('link', { name: 'Curves', exact: true }).click()
  await expect(page).toHaveURL(/\/studies\/S-004\/curves$/)
  for (const name of [/^pH/, /^Viscosity/, /^Separation/])
    await expect(
      page.getByRole('img', { name }).or(page.getByRole('heading', { name })).first(),
    ).toBeVisible()

  await page.getByRole('link', { name: 'Sheet', exact: true }).click()
  await page
    .getByRole('link', { name: /^Answer flag \d+$/ })
    .first()
    .click()
  await expect(page).toHaveURL(/\/flags\/\d+$/)
  const number = page.url().split('/').at(-1)!
  const answer = page.getByRole('region', { name: 'Your answer' })
  await answer.getByRole('radio', { name: /^The product changes/ }).check()
  await answer.getByLabel('Why you think so').fill('It moves in step with the heat and with the watch jar.')
  await answer.getByRole('checkbox', { name: 'Keep reading as planned' }).check()
  await answer.getByRole('textbox', { name: 'Something else' }).fill('More polymer in the next version')
  await answer.getByRole('button', { name: `Answer flag ${number}` }).click()
  const answered = page.getByRole('region', { name: /^Answered/ })
  await expect(answered).toContainText('Keep reading as planned. More polymer in the next version')
  await expect(answered).toContainText(/Liv Brannock, \d+ [A-Z][a-z]+/)
})

test('The story, formulator: puts a shelf-life case forward, whose figures are frozen with their hash', async ({
  page,
}) => {
  await pressIn(page, 'liv', '/studies/S-003')
  await page.getByRole('link', { name: 'Put a shelf-life case forward' }).click()
  await expect(page).toHaveURL(/\/cases\/new\?study=S-003$/)
  const proposal = page.getByRole('form', { name: 'Proposal' })
  await expect(proposal.getByLabel('How it is stored')).toHaveValue(/^closed, at or below 25 °C$/)
  const months = Number(await proposal.getByLabel('Months', { exact: true }).inputValue())
  expect(months).toBeGreaterThan(0)
  await proposal.getByLabel('Months', { exact: true }).fill(String(months - 1))
  await proposal
    .getByLabel(`Why ${months - 1}, not ${months}`)
    .fill('One batch only, so one month is held back.')
  await proposal.getByRole('button', { name: 'Begin the case' }).click()
  await expect(page).toHaveURL(/\/cases\/C-\d+$/)
  await page.getByRole('button', { name: 'Put it forward' }).click()
  const box = page.getByRole('region', { name: 'Signature' })
  await expect(box.getByRole('heading', { name: 'Waits for QA' })).toBeVisible()
  await expect(box).toContainText(/Put forward by LB, \d/)
  const code = page.url().split('/').at(-1)!
  const frozen = (await (await page.request.get(`/api/cases/${code}`)).json()) as { contentSha256: string }
  expect(frozen.contentSha256).toMatch(/^[0-9a-f]{64}$/)
  const shown = (await box.innerText()).replace(/\s+/g, '')
  expect(shown.toLowerCase()).toContain(frozen.contentSha256)
})
