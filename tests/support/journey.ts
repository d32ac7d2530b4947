// What a user does on an ordinary day, in whichever shell: open a plan, rehearse it, read the answer; come back later and
// find it as it was.
import type { Locator, Page } from 'playwright-core';

/** An example that has two pipettes, runs in seconds, and is not rehearsed on the first start. */
const planName = 'Soma clamped, dendrite watched';

const plan = (page: Page): Locator =>
  page.getByRole('navigation', { name: 'Notebook' }).getByRole('button', { name: new RegExp(`^${planName}`) });
const answer = (page: Page): Locator => page.getByRole('contentinfo', { name: 'Answer' });

/** The figures of the answer line, once a rehearsal stands behind them. */
async function figures(page: Page): Promise<string[]> {
  const reach = answer(page).getByRole('button', { name: /^Reach .* % of membrane/ });
  const read = answer(page).getByRole('button', { name: /reads .*, is / });
  await reach.waitFor({ timeout: 50_000 });
  await read.waitFor({ timeout: 50_000 });
  return [await reach.innerText(), await read.innerText()];
}

/** Opens the plan, rehearses it, and gives the figures of its answer. */
export async function rehearse(page: Page): Promise<string[]> {
  // The first start shows a rehearsed example, which takes a moment to come.
  await figures(page);
  await plan(page).click();
  await answer(page).getByText('when the plan is rehearsed').waitFor();
  await page.getByRole('banner', { name: 'Plan' }).getByRole('button', { name: 'Rehearse' }).click();
  return figures(page);
}

/** In a window opened later on the same notebook: the plan is there, marked as rehearsed, and so are its figures. */
export async function findAgain(page: Page): Promise<string[]> {
  await plan(page)
    .filter({ hasText: /\d\d:\d\d/ })
    .click();
  return figures(page);
}
