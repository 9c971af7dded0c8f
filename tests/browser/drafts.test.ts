/** Drafts lose nothing: by a reload, without a connection, in two tabs, between two people. */
import { afterAll, afterEach, beforeAll, describe, expect, it, vi } from 'vitest';
import type { Page } from 'playwright-core';
import { openBrowser, type TestBrowser } from './support/chromium.ts';
import {
  editorText,
  expectGoodBehaviour,
  focusEditor,
  openModel,
  PATIENCE,
  signIn,
} from './support/rooms.ts';
import { openBrowserSite, type BrowserSite } from './support/site.ts';

vi.setConfig({ testTimeout: 240_000 });

const MODEL = 'Two states of the additive';

let site: BrowserSite;
const browsers: TestBrowser[] = [];
beforeAll(async () => {
  site = await openBrowserSite();
});
afterEach(async () => {
  const closed = browsers.splice(0);
  await Promise.all(closed.map((browser) => browser.close()));
  for (const { misdeeds } of closed) expectGoodBehaviour(misdeeds);
});
afterAll(() => site?.close());

async function openAs(name: string): Promise<{ browser: TestBrowser; page: Page }> {
  const browser = await openBrowser(site.url);
  browsers.push(browser);
  const page = await browser.open('/sign-in');
  await signIn(page, name);
  await openModel(page, MODEL);
  await focusEditor(page);
  return { browser, page };
}

async function append(page: Page, line: string): Promise<void> {
  await focusEditor(page);
  await page.keyboard.press('Control+End');
  await page.keyboard.type(line);
}

const saved = async (page: Page): Promise<void> => {
  await page.getByText(/^draft saved/).waitFor({ timeout: PATIENCE.timeout });
};

describe('a draft', () => {
  it('survives a reload in the middle of a word', async () => {
    const { page } = await openAs('T. Oswin');
    await append(page, '\n# written before the reload');
    await page.reload();
    await expect.poll(() => editorText(page), PATIENCE).toContain('# written before the reload');
    await saved(page);
    await page.reload();
    await expect.poll(() => editorText(page), PATIENCE).toContain('# written before the reload');
  });

  it('is kept without a connection, and saved when it returns', async () => {
    const { browser, page } = await openAs('T. Oswin');
    await browser.context.setOffline(true);
    await append(page, '\n# written offline');
    await page.getByText(/no connection: kept in this browser/).waitFor();
    await browser.context.setOffline(false);
    await saved(page);
    const { page: other } = await openAs('I. Varnholt');
    await expect.poll(() => editorText(other), PATIENCE).toContain('# written offline');
  });

  it('is the same in two tabs of one browser', async () => {
    const { browser, page } = await openAs('T. Oswin');
    const other = await browser.open(new URL(page.url()).pathname);
    await other.locator('.monaco-editor .view-line').first().waitFor();
    await append(page, '\n# from the first tab');
    await expect.poll(() => editorText(other), PATIENCE).toContain('# from the first tab');
    await append(other, '\n# from the second tab');
    await expect.poll(() => editorText(page), PATIENCE).toContain('# from the second tab');
  });

  it('of two people is shown to the second with both texts, and never overwritten', async () => {
    const { page: mine } = await openAs('T. Oswin');
    const { page: theirs } = await openAs('I. Varnholt');
    await append(theirs, '\n# by the editor');
    await saved(theirs);
    await append(mine, '\n# by the modeler');
    const both = mine.getByRole('region', { name: 'Two texts of this draft' });
    await both.waitFor();
    await expect
      .poll(() => both.getByLabel(/saved by I. Varnholt/).inputValue())
      .toContain('# by the editor');
    const own = both.getByLabel(/yours/);
    expect(await own.inputValue()).toContain('# by the modeler');
    await own.fill(`${await both.getByLabel(/saved by/).inputValue()}\n# both`);
    await both.getByRole('button', { name: 'Keep mine' }).click();
    await saved(mine);
    await theirs.reload();
    await expect.poll(() => editorText(theirs), PATIENCE).toContain('# both');
    expect(await editorText(theirs)).toContain('# by the editor');
  });
});
