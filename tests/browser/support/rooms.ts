/** The ways of a person through the application. */
import type { Locator, Page } from 'playwright-core';
import { expect } from 'vitest';
import type { Misdeeds } from './chromium.ts';

/** Patience on a crowded machine; conditions are polled, nothing waits so long that holds sooner. */
export const PATIENCE = { timeout: 120_000, interval: 100 };

/** Signs in as one of the invented people, through the local stand-in for the identity provider. */
export async function signIn(page: Page, name: string): Promise<void> {
  await page.goto('/sign-in');
  await page.getByRole('link', { name: 'Sign in with GitHub' }).click();
  await page.getByRole('button', { name }).click();
  await page.waitForURL('**/desk');
}

/** Opens a model of the demonstration at its formulation; answers with its address. */
export async function openModel(page: Page, title: string): Promise<string> {
  await page.goto('/desk');
  await page.getByRole('link', { name: 'Working fluid K-7' }).first().click();
  await page.waitForURL('**/notebooks/*');
  await page.getByRole('table').getByRole('link', { name: title, exact: true }).click();
  await consequences(page).waitFor();
  return new URL(page.url()).pathname;
}

export const consequences = (page: Page): Locator =>
  page.getByRole('complementary', { name: 'Consequences' });

/** Waits for the editor and puts the cursor into it. */
export async function focusEditor(page: Page): Promise<void> {
  await page.locator('.monaco-editor .view-line').first().click();
}

/** The text of the editor, as it stands on the page. */
export async function editorText(page: Page): Promise<string> {
  const lines = page.locator('.monaco-editor .view-lines');
  // The lines of the view stand in the order in which they were drawn.
  return lines.evaluate((element) =>
    [...element.querySelectorAll<HTMLElement>('.view-line')]
      .sort((a, b) => parseFloat(a.style.top) - parseFloat(b.style.top))
      .map((line) => (line.textContent ?? '').replaceAll('\u00a0', ' '))
      .join('\n'),
  );
}

/** Replaces the whole text by typing it, as a person would. */
export async function typeInto(page: Page, text: string): Promise<void> {
  await focusEditor(page);
  await page.keyboard.press('Control+A');
  await page.keyboard.press('Delete');
  await page.keyboard.type(text);
}

/** The TeX from which a formula of the page was set: KaTeX keeps it beside the glyphs. */
export async function texWithin(place: Locator): Promise<string> {
  const annotation = place.locator('annotation[encoding="application/x-tex"]').first();
  return (await annotation.textContent()) ?? '';
}

/** The formula of a property in the margin of the formulation. */
export function consequenceOf(page: Page, property: string): Locator {
  return consequences(page).locator(`dt[title="${property}"] + dd`);
}

/** Nothing was asked of another machine, no policy was broken, no script failed. */
export function expectGoodBehaviour(misdeeds: Misdeeds): void {
  expect(misdeeds).toEqual({ foreign: [], policy: [], errors: [] });
}
