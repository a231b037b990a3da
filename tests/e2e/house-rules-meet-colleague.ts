import { expect, test } from '@playwright/test'
import { signIn } from '#tests/support/journey.ts'

test('house rules that a colleague changed meanwhile: what was chosen stays chosen when it is refused', async ({
  page,
  browser,
}) => {
  await signIn(page, 'engineer')
  await page.goto('/rules/house')
  const colleague = await browser.newPage()
  await signIn(colleague, 'owner')
  await colleague.goto('/rules/house')
  await colleague.getByLabel('Target from').fill('300')
  await colleague.getByRole('button', { name: 'Save' }).click()
  await expect(colleague.getByText('Saved.')).toBeVisible()

  const field = (label: string) => page.getByLabel(label, { exact: true })
  const save = page.getByRole('button', { name: 'Save', exact: true })
  await field('Target from').fill('140')
  await field('Target to').fill('250')
  await save.click()
  // What is typed below the choice would be in neither copy.
  await expect(page.getByRole('button', { name: 'Save these' })).toBeVisible()
  await expect(field('Spread and overlap')).toBeDisabled()
  await expect(save).toBeDisabled()

  await page.getByRole('button', { name: /Use 300$/ }).click()
  await page.getByRole('button', { name: 'Save these' }).click()
  await expect(page.getByText('The target ends above where it starts.').first()).toBeVisible()
  await expect(field('Target from')).toHaveValue('300')
  await expect(field('Target to')).toHaveValue('250')
  await field('Target to').fill('340')
  await save.click()
  await expect(page.getByText('Saved.')).toBeVisible()
  await page.reload()
  await expect(field('Target from')).toHaveValue('300')
  await expect(field('Target to')).toHaveValue('340')

  // The other journeys count on the defaults.
  await field('Target from').fill('150')
  await field('Target to').fill('350')
  await save.click()
  await expect(page.getByText('Saved.')).toBeVisible()
})
