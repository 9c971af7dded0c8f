/** From signing in to a version with seals, though the worker is killed in the middle. */
import { afterAll, beforeAll, expect, it, vi } from 'vitest';
import type { Page } from 'playwright-core';
import { createHold } from '../api/support/workers.ts';
import { openBrowser, type TestBrowser } from './support/chromium.ts';
import {
  consequenceOf,
  expectGoodBehaviour,
  PATIENCE,
  signIn,
  texWithin,
  typeInto,
} from './support/rooms.ts';
import { openBrowserSite, type BrowserSite } from './support/site.ts';

vi.setConfig({ testTimeout: 400_000 });

const FORMULATION = `# Hard-core fluid with mean-field attraction
ensemble canonical
constant m [u] = 39.948 "molecular mass"
parameter a [J m^3] = 3.7e-49 between 0 and 1e-47 "attraction"
parameter b [m^3] = 5.3e-29 between 1e-30 and 1e-27 "excluded volume"
let Lambda = h / sqrt(2 pi m k T)
q = (V - N b) / Lambda^3 * exp(a N / (V k T))
Q = q^N / N!
claim "ideal when dilute" p V / (N k T) -> 1 as V -> inf
`;

/** p = N k T / (V − N b) − a N² / V². */
const PRESSURE = '\\frac{N k T}{V - N b} - \\frac{a N^{2}}{V^{2}}';

let site: BrowserSite;
let browser: TestBrowser;
beforeAll(async () => {
  site = await openBrowserSite();
  browser = await openBrowser(site.url);
});
afterAll(async () => {
  await browser?.close();
  await site?.close();
});

async function beginModel(page: Page): Promise<void> {
  await page.getByRole('link', { name: 'Working fluid K-7' }).first().click();
  await page.getByRole('button', { name: 'Begin a model' }).first().click();
  await page.getByLabel('Title').fill('Hard-core fluid');
  await page.getByRole('button', { name: 'Begin the model' }).click();
  await page.getByRole('heading', { name: 'Hard-core fluid' }).waitFor();
}

it('a person writes a model, sees it derived, freezes it and finds it verified', async () => {
  const page = await browser.open('/');
  await signIn(page, 'I. Varnholt');
  await beginModel(page);

  await typeInto(page, FORMULATION);
  await expect.poll(() => texWithin(consequenceOf(page, 'pressure')), PATIENCE).toBe(PRESSURE);
  await expect.poll(() => page.getByText('holds, by limit').count(), PATIENCE).toBe(1);

  const hold = createHold();
  try {
    const first = site.work({ MASSIEU_TEST_HOLD: hold.path });
    await page.getByRole('button', { name: 'Freeze as version 1' }).click();
    const dialog = page.getByRole('dialog');
    await dialog.getByLabel(/What is new in it/).fill('First statement');
    await dialog.getByRole('button', { name: 'Freeze as version 1' }).click();
    await page.waitForURL('**/properties?version=1');
    await page.getByRole('progressbar').waitFor({ timeout: PATIENCE.timeout });
    await page.getByRole('button', { name: 'Cancel' }).waitFor();
    // The worker has taken it, and holds it where it is.
    await page.getByRole('progressbar', { name: /^(reading|deriving|ln of)/ }).waitFor();
    await first.kill();
  } finally {
    hold.close();
  }
  site.work();

  const pressure = page.getByRole('region', { name: 'pressure', exact: true });
  await pressure.waitFor({ timeout: 300_000 });
  await expect.poll(() => texWithin(pressure.locator('.property-formula'))).toBe(`p = ${PRESSURE}`);
  const seals = page.getByRole('button', { name: /^verified \d+ of \d+$/ });
  await expect.poll(() => seals.count()).toBeGreaterThan(10);
  await seals.first().click();
  await page
    .getByText(/Maxwell|derivative/)
    .first()
    .waitFor();

  await page.getByRole('link', { name: 'Versions' }).click();
  await page.getByText('First statement').waitFor();
  await page
    .getByText(/^verified/)
    .first()
    .waitFor();
  expectGoodBehaviour(browser.misdeeds);
});
