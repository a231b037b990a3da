import { expect, test } from '@playwright/test'

const password = 'warm-terrace-demo'

test.describe('without scripts, as before hydration', () => {
  test.use({ javaScriptEnabled: false })

  test('signs in and goes on to where the person wanted to go', async ({ page, context }) => {
    await page.goto('/jobs/new')
    await expect(page).toHaveURL(/\/sign-in\?next=%2Fjobs%2Fnew$/)
    await page.getByLabel('E-mail').fill('designer@inglefield.test')
    await page.getByLabel('Password').fill(password)
    await page.getByRole('button', { name: 'Sign in' }).click()
    await expect(page).toHaveURL(/\/jobs\/new$/)
    const [cookie] = await context.cookies()
    expect(cookie).toMatchObject({ name: 'inglefield.session_token', httpOnly: true, sameSite: 'Lax' })
  })

  test('keeps the e-mail and says what is wrong beside the field, never the password in the address', async ({
    page,
  }) => {
    await page.goto('/sign-in')
    await page.getByLabel('E-mail').fill('designer@inglefield.test')
    await page.getByLabel('Password').fill('not the password')
    await page.getByRole('button', { name: 'Sign in' }).click()
    await expect(page.getByLabel('E-mail')).toHaveValue('designer@inglefield.test')
    await expect(page.getByLabel('Password')).toHaveAccessibleDescription(/do not belong together/)
    expect(page.url()).not.toContain('not')
  })
})

test('signs in with scripts, without a violation of the content policy, and out again', async ({ page }) => {
  const violations: string[] = []
  page.on('console', (message) => {
    if (message.text().includes('Content Security Policy')) violations.push(message.text())
  })
  await page.goto('/sign-in?next=//evil.example/')
  await page.getByLabel('E-mail').fill('engineer@inglefield.test')
  await page.getByLabel('Password').fill(password)
  await page.getByRole('button', { name: 'Sign in' }).click()
  await expect(page).toHaveURL(/\/jobs$/)
  expect(violations).toEqual([])
  const answer = await page.request.post('/sign-out', { headers: { Origin: new URL(page.url()).origin } })
  expect(answer.ok()).toBe(true)
  await page.goto('/jobs')
  await expect(page).toHaveURL(/\/sign-in\?next=%2Fjobs$/)
})

test('answers an unknown address with the error page and all headers', async ({ page }) => {
  const answer = await page.goto('/no/such/page')
  expect(answer?.status()).toBe(404)
  expect(answer?.headers()).toMatchObject({ 'x-content-type-options': 'nosniff', 'cache-control': 'private, no-store' })
  await expect(page.getByRole('heading', { level: 1 })).toHaveText('Nothing at this address')
})
