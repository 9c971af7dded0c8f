/** Chromium for tests. Every page is watched: what it asks elsewhere, and what its policy forbids. */
import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import {
  chromium,
  type BrowserContext,
  type BrowserContextOptions,
  type Page,
} from 'playwright-core';

const EXECUTABLE = process.env['CHROMIUM'] ?? '/usr/bin/chromium';
const FLAGS = [
  '--headless',
  '--no-sandbox',
  '--disable-gpu',
  '--disable-quic',
  '--no-first-run',
  '--disable-background-networking',
  '--disable-component-update',
  '--disable-sync',
];

export const DESK = { width: 1440, height: 900 };
export const PHONE = { width: 390, height: 844 };

/** What pages did that they must not do; tests expect all of it to stay empty. */
export interface Misdeeds {
  /** Addresses outside this machine. */
  readonly foreign: string[];
  /** Violations of the content security policy. */
  readonly policy: string[];
  /** Errors of scripts that nobody caught. */
  readonly errors: string[];
}

export interface TestBrowser {
  readonly context: BrowserContext;
  readonly misdeeds: Misdeeds;
  open(path: string): Promise<Page>;
  close(): Promise<void>;
}

/** Opens a browser of its own, with a fresh folder for what it stores. */
export async function openBrowser(
  baseURL: string,
  options: BrowserContextOptions = {},
): Promise<TestBrowser> {
  const folder = mkdtempSync(join(tmpdir(), 'massieu-chromium-'));
  const context = await chromium.launchPersistentContext(folder, {
    executablePath: EXECUTABLE,
    args: FLAGS,
    headless: true,
    baseURL,
    viewport: DESK,
    colorScheme: 'light',
    reducedMotion: 'reduce',
    ...options,
  });
  const misdeeds: Misdeeds = { foreign: [], policy: [], errors: [] };
  context.on('request', (request) => {
    const { protocol, hostname } = new URL(request.url());
    if (['data:', 'blob:'].includes(protocol)) return;
    if (hostname !== '127.0.0.1') misdeeds.foreign.push(request.url());
  });
  context.on('weberror', (error) => misdeeds.errors.push(String(error.error())));
  context.on('console', (message) => {
    if (/content security policy/i.test(message.text())) misdeeds.policy.push(message.text());
  });
  return {
    context,
    misdeeds,
    async open(path) {
      const page = await context.newPage();
      await page.goto(path);
      return page;
    },
    async close() {
      await context.close();
      rmSync(folder, { recursive: true, force: true });
    },
  };
}
