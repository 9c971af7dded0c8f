/** The front door as a visitor meets it. */
import { afterAll, afterEach, beforeAll, describe, expect, it } from 'vitest';
import { openBrowser, PHONE, type TestBrowser } from './support/chromium.ts';
import { expectGoodBehaviour, PATIENCE, texWithin } from './support/rooms.ts';
import { openBrowserSite, type BrowserSite } from './support/site.ts';

let site: BrowserSite;
let browser: TestBrowser | undefined;
beforeAll(async () => {
  site = await openBrowserSite();
});
afterEach(async () => {
  await browser?.close();
  browser = undefined;
});
afterAll(() => site?.close());

describe('the specimen of the front door', () => {
  it.each([
    ['on a desk', undefined],
    ['on a phone', PHONE],
  ])('follows when a line is changed, %s', async (_, viewport) => {
    browser = await openBrowser(site.url, viewport ? { viewport, hasTouch: true } : {});
    const page = await browser.open('/');
    const pressure = page.locator('dt', { hasText: 'pressure' }).locator('+ dd');
    await expect
      .poll(() => texWithin(pressure), PATIENCE)
      .toBe('p = \\frac{N k T}{V - N b} - \\frac{a N^{2}}{V^{2}}');
    const field = page.getByRole('textbox', { name: 'Formulation' });
    await field.fill((await field.inputValue()).replace(' * exp(a N / (V k T))', ''));
    await expect.poll(() => texWithin(pressure), PATIENCE).toBe('p = \\frac{N k T}{V - N b}');
    // A fault leaves the last sound consequences where they are, and says what must be mended.
    await field.fill((await field.inputValue()).replace('N b', 'N bb'));
    await page.getByText(/bb/).first().waitFor();
    expect(await texWithin(pressure)).toBe('p = \\frac{N k T}{V - N b}');
    expectGoodBehaviour(browser.misdeeds);
  });

  it('is served under a policy that lets in nothing from elsewhere', async () => {
    browser = await openBrowser(site.url);
    const page = await browser.context.newPage();
    const response = await page.goto('/');
    const policy = response?.headers()['content-security-policy'] ?? '';
    expect(policy).toContain("default-src 'self'");
    expect(policy).toContain("script-src 'self'");
    expect(policy).not.toContain('unsafe-eval;');
    expect(policy).not.toMatch(/script-src[^;]*unsafe-inline/);
    // A script from elsewhere, had one slipped in, is not even fetched.
    const isRefused = await page.evaluate(
      () =>
        new Promise<boolean>((resolve) => {
          document.addEventListener('securitypolicyviolation', () => resolve(true));
          const script = document.createElement('script');
          script.src = 'http://elsewhere.example/script.js';
          script.onload = () => resolve(false);
          document.head.append(script);
        }),
    );
    expect(isRefused).toBe(true);
  });

  it('is drawn by less than 200 kB of compressed script', async () => {
    browser = await openBrowser(site.url);
    const page = await browser.context.newPage();
    await page.goto('/');
    await page.locator('annotation').first().waitFor({ state: 'attached' });
    const scripts = await page.evaluate(() =>
      performance
        .getEntriesByType('resource')
        .filter(({ name }) => new URL(name).pathname.endsWith('.js'))
        .map((entry) => ({
          name: entry.name.split('/').at(-1) ?? '',
          bytes: (entry as PerformanceResourceTiming).encodedBodySize,
        })),
    );
    // What comes behind the drawn page: typesetting, the plot with its evaluation, the workers.
    const isLater = /^(typeset|Isotherms|compile|json|[\w.]*worker)-/;
    const first = scripts.filter(({ name }) => !isLater.test(name));
    expect(first.length).toBeGreaterThan(3);
    expect(first.reduce((sum, { bytes }) => sum + bytes, 0)).toBeLessThan(200_000);
  });
});
