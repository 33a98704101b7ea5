import { existsSync } from 'node:fs';
import type { Server } from 'node:http';
import type { AddressInfo } from 'node:net';
import { chromium } from 'playwright-core';
import type { Browser, Page } from 'playwright-core';
import { servePage } from '../../addin/desk/command/servePage';
import { distFolder } from '../tools/buildIfStale.js';

/** Where Debian puts its browser. */
export const browserPath = ['/usr/bin/chromium', '/usr/bin/chromium-browser'].find((path) => existsSync(path));

export interface Desk {
  readonly browser: Browser;
  readonly address: string;
  close(): Promise<void>;
}

/** The desk's page served, and a browser to look at it. */
export async function startDesk(book?: string): Promise<Desk> {
  const server: Server = await servePage(distFolder, book, 0);
  const browser = await chromium.launch({
    executablePath: browserPath,
    args: ['--no-sandbox', '--disable-gpu', '--disable-quic', '--no-first-run', '--disable-background-networking', '--disable-component-update', '--disable-sync'],
  });
  return {
    browser,
    address: `http://localhost:${(server.address() as AddressInfo).port}/`,
    close: async () => {
      await browser.close();
      await new Promise((closed) => { server.close(closed); server.closeAllConnections(); });
    },
  };
}

/** Opens the page and waits until the workbook stands there; what the page complains of is collected. */
export async function openPage({ browser, address }: Desk, options: Parameters<Browser['newPage']>[0] = {}): Promise<{ page: Page; complaints: string[] }> {
  const page = await browser.newPage({ viewport: { width: 1440, height: 900 }, ...options });
  const complaints: string[] = [];
  page.on('console', (message) => { if (message.type() === 'error' && !message.text().includes('404')) complaints.push(message.text()); });
  page.on('pageerror', (error) => complaints.push(String(error)));
  await page.goto(address);
  await page.waitForSelector('.rootsum-pane [role="tab"]', { timeout: 10_000 });
  return { page, complaints };
}
