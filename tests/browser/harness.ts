import { mkdtempSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import type { Browser, BrowserContext, Page } from 'playwright-core';
import { build, type PreviewServer, preview } from 'vite';
import { startChromium } from './chromium.ts';

const CONFIG = join(import.meta.dirname, '../../vite.config.ts');

/** The built editor on a local server, and a browser to open it in. */
export class Editor {
  private readonly browser: Browser;
  private readonly server: PreviewServer;

  private constructor(browser: Browser, server: PreviewServer) {
    this.browser = browser;
    this.server = server;
  }

  static async start(): Promise<Editor> {
    const outDir = mkdtempSync(join(tmpdir(), 'skewback-editor-'));
    // The test runner's own environment would make a build of another kind than the one that users get.
    process.env.NODE_ENV = 'production';
    await build({ configFile: CONFIG, logLevel: 'error', build: { outDir, emptyOutDir: true } });
    const server = await preview({
      configFile: CONFIG,
      logLevel: 'error',
      build: { outDir },
      preview: { port: 0, host: '127.0.0.1' },
    });
    return new Editor(await startChromium(), server);
  }

  get address(): string {
    return this.server.resolvedUrls?.local[0] ?? '';
  }

  /** A new window with storage of its own, on a ready arch. What the page complains of fails the test. */
  async open(options: Parameters<Browser['newContext']>[0] = {}): Promise<Page> {
    const context = await this.browser.newContext({ viewport: { width: 1280, height: 800 }, ...options });
    return this.openIn(context);
  }

  /** A window beside others that share their storage. */
  async openIn(context: BrowserContext): Promise<Page> {
    const page = await context.newPage();
    const complaints: string[] = [];
    page.on('pageerror', (error) => complaints.push(error.message));
    page.on('console', (message) => {
      if (message.type() === 'error') complaints.push(message.text());
    });
    page.on('close', () => {
      if (complaints.length > 0) throw new Error(`the page complained: ${complaints.join('\n')}`);
    });
    await page.goto(this.address);
    await page.locator('sk-slip').first().waitFor();
    return page;
  }

  async stop(): Promise<void> {
    await this.browser.close();
    await this.server.close();
  }
}

/** A reading's value on the rail. */
export async function readingOn(page: Page, id: string): Promise<string> {
  return (
    (await page.locator(`sk-rail [data-reading="${id}"] .value`).textContent())?.replaceAll('\u00a0', ' ') ??
    ''
  );
}
