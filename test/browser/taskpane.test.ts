import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { distFolder } from '../tools/buildIfStale.js';
import { browserPath, startDesk } from './openPage';
import type { Desk } from './openPage';

const officeFolder = fileURLToPath(new URL('../../node_modules/@microsoft/office-js/dist/', import.meta.url));
let desk: Desk;

describe.runIf(browserPath)('the add-in\'s page outside a host', () => {
  beforeAll(async () => { desk = await startDesk(); });
  afterAll(() => desk?.close());

  it('loads the real office.js, registers nothing with a host that is not there, and throws nothing', async () => {
    const page = await desk.browser.newPage();
    const errors: string[] = [];
    const asked: string[] = [];
    page.on('pageerror', (error) => errors.push(String(error)));
    // the library of the vendor comes from the package of the same name; the page from what is built, without the desk's policy
    await page.route('https://appsforoffice.microsoft.com/**', (route) => {
      const name = new URL(route.request().url()).pathname.replace('/lib/1/hosted/', '');
      asked.push(name);
      try {
        return route.fulfill({ contentType: 'text/javascript', body: readFileSync(join(officeFolder, name)) });
      } catch {
        return route.abort();
      }
    });
    await page.route('**/taskpane.html', (route) => route.fulfill({ contentType: 'text/html', body: readFileSync(join(distFolder, 'taskpane.html')) }));
    await page.goto(`${desk.address}taskpane.html`);
    await page.waitForTimeout(2500);
    expect(asked[0]).toBe('office.js');
    expect(errors).toEqual([]);
    expect(await page.evaluate('[typeof Office, document.getElementById("pane").childElementCount]')).toEqual(['object', 0]);
    // the port is there before a host could be; without one it says what is needed
    expect(await page.evaluate('Promise.race([RootsumPort.sheets().then(String, String), new Promise((r) => setTimeout(r, 1500, "waits"))])')).toMatch(/needs an Excel|waits/);
    await page.close();
  });
});
