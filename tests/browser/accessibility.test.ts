/** Every room, in both themes and at the width of a phone, held against the rules of axe. */
import AxeBuilder from '@axe-core/playwright';
import { afterAll, beforeAll, describe, expect, it, vi } from 'vitest';
import type { Page } from 'playwright-core';
import { DESK, openBrowser, PHONE, type TestBrowser } from './support/chromium.ts';
import { consequences, expectGoodBehaviour, openModel, signIn } from './support/rooms.ts';
import { openBrowserSite, type BrowserSite } from './support/site.ts';

vi.setConfig({ testTimeout: 400_000, hookTimeout: 400_000 });

const RULES = ['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa'];

let site: BrowserSite;
let browser: TestBrowser;
let page: Page;
let model: string;
beforeAll(async () => {
  site = await openBrowserSite();
  browser = await openBrowser(site.url);
  page = await browser.open('/');
  page.setDefaultTimeout(120_000);
});
afterAll(async () => {
  await browser?.close();
  await site?.close();
});

/** What axe finds in a page: rule, and where. */
async function violations(): Promise<string[]> {
  const { violations: found } = await new AxeBuilder({ page }).withTags(RULES).analyze();
  return found.flatMap(({ id, nodes }) =>
    nodes.map(({ target, failureSummary }) => `${id}: ${target.join(' ')} ${failureSummary ?? ''}`),
  );
}

async function isSoundInAllDress(): Promise<void> {
  for (const viewport of [DESK, PHONE]) {
    await page.setViewportSize(viewport);
    for (const colorScheme of ['light', 'dark'] as const) {
      await page.emulateMedia({ colorScheme, reducedMotion: 'reduce' });
      await page.locator(`html[data-theme="${colorScheme}"]`).waitFor();
      expect(await violations(), `${page.url()} ${colorScheme} ${viewport.width}`).toEqual([]);
      const overflow = await page.evaluate(
        () => document.documentElement.scrollWidth - document.documentElement.clientWidth,
      );
      expect(overflow, `${page.url()} scrolls sideways at ${viewport.width}`).toBeLessThanOrEqual(
        0,
      );
    }
  }
  await page.setViewportSize(DESK);
}

describe('before one signs in', () => {
  it.each(['/', '/language', '/sign-in', '/sign-in/register', '/sign-in/forgotten', '/nowhere'])(
    '%s is open to everybody',
    async (path) => {
      await page.goto(path);
      await page.getByRole('heading', { level: 1 }).first().waitFor();
      if (path === '/') await page.locator('annotation').first().waitFor({ state: 'attached' });
      await isSoundInAllDress();
    },
  );
});

describe('for those who are signed in', () => {
  beforeAll(async () => {
    await signIn(page, 'I. Varnholt');
    model = await openModel(page, 'Hard core with mean-field attraction');
  });

  it('the desk', async () => {
    await page.goto('/desk');
    await page.getByRole('link', { name: 'Working fluid K-7' }).first().waitFor();
    await isSoundInAllDress();
  });

  it('a group and a notebook', async () => {
    await page.goto(model);
    await page.getByRole('link', { name: 'Working Fluids, Hallowmere Works' }).click();
    await page.waitForURL('**/groups/*');
    await page.getByText('T. Oswin').first().waitFor();
    await isSoundInAllDress();
    await page.getByRole('link', { name: 'Working fluid K-7' }).first().click();
    await page.waitForURL('**/notebooks/*');
    await page.getByText('Packing of the store').first().waitFor();
    await isSoundInAllDress();
  });

  it('a formulation, sound and at fault, and the dialog that freezes it', async () => {
    await page.goto(model);
    await consequences(page).locator('annotation').first().waitFor({ state: 'attached' });
    await page.locator('.monaco-editor .view-line').first().waitFor();
    await isSoundInAllDress();
    await page.getByRole('button', { name: /Freeze as version/ }).click();
    await page.getByRole('dialog').waitFor();
    await isSoundInAllDress();
    await page.keyboard.press('Escape');
    await page.locator('.monaco-editor .view-line', { hasText: 'exp(' }).click();
    await page.keyboard.press('End');
    await page.keyboard.type(' + nothing');
    await page.getByText(/must be mended/).waitFor();
    await isSoundInAllDress();
    await page.keyboard.press('Control+Z');
  });

  it('a version whose derivation was cancelled, and derived again', async () => {
    await page.goto(`${model}/properties`);
    await page.getByText(/The derivation was cancelled/).waitFor();
    await isSoundInAllDress();
    site.work();
    await page.getByRole('button', { name: 'Derive again' }).click();
    await page.getByRole('region', { name: 'pressure', exact: true }).waitFor({ timeout: 300_000 });
  });

  it('the properties, with everything opened that opens, and the calculator of derivatives', async () => {
    await page.goto(`${model}/properties`);
    const pressure = page.getByRole('region', { name: 'pressure', exact: true });
    await pressure.waitFor();
    await pressure.locator('summary').click();
    await pressure.getByRole('button', { name: /verified/ }).click();
    await isSoundInAllDress();
    await page.getByRole('button', { name: /Any derivative/ }).click();
    await page.getByRole('dialog').locator('annotation').first().waitFor({ state: 'attached' });
    await isSoundInAllDress();
  });

  it('the versions', async () => {
    await page.goto(`${model}/versions`);
    await page.getByText('First statement for K-7').waitFor();
    await isSoundInAllDress();
    await page.goto(`${model}/versions/1`);
    await page.getByRole('heading', { name: 'Verification' }).waitFor();
    await isSoundInAllDress();
  });

  it('nothing of it asks another machine or breaks the policy', () => {
    expectGoodBehaviour(browser.misdeeds);
  });
});
