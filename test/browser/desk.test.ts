import { mkdirSync, mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { createRequire } from 'node:module';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import type { Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { openBook } from '../../addin/desk/book/openBook';
import { readPlan } from '../../addin/desk/command/readPlan';
import { buildDemoBook } from '../../addin/desk/demo/buildDemoBook';
import demoPlan from '../../addin/desk/demo/demoPlan.json';
import { applyPlan } from '../../addin/desk/sheet/applyPlan';
import { Desk as OpenDesk } from '../../addin/desk/sheet/Desk';
import { buildBook } from '../desk/book/buildBook';
import { builtFunctions } from '../desk/sheet/bundle';
import { browserPath, openPage, startDesk } from './openPage';
import type { Desk } from './openPage';

const axe = readFileSync(createRequire(import.meta.url).resolve('axe-core/axe.min.js'), 'utf8');
const pictures = fileURLToPath(new URL('../../out/pictures/', import.meta.url));
const folder = mkdtempSync(join(tmpdir(), 'browser-'));
let demo: Desk;
let small: Desk;

if (!browserPath) console.log('No Chromium is installed: the tests in a browser are left out (apt install chromium)');

const cell = (page: Page, row: number, col: number) => page.locator(`td[data-row="${row}"][data-col="${col}"]`);
const tab = (page: Page, name: string) => page.getByRole('tab', { name, exact: true }).click();
const step = (page: Page, name: string) => page.locator('.rootsum-pane').getByRole('tab', { name }).click();
const line = (page: Page) => page.locator('.rootsum-pane .line');
const paneText = (page: Page) => page.locator('.rootsum-pane .panel');

/** A workbook of so many rows: two numbers and their sum. */
const longBook = (rows: number): Uint8Array => buildBook({ sheets: [{ name: 'Long', xml: `<sheetData>${Array.from({ length: rows }, (_, i) =>
  `<row r="${i + 1}"><c r="A${i + 1}"><v>${i + 1}</v></c><c r="B${i + 1}"><v>${2 * (i + 1)}</v></c><c r="C${i + 1}"><f>A${i + 1}+B${i + 1}</f><v>${3 * (i + 1)}</v></c></row>`).join('')}</sheetData>` }] });

/** What the accessibility rules object to. The page's own policy forbids scripts from elsewhere; this one comes through the debugger. */
async function objections(page: Page, where: string): Promise<string[]> {
  const found = await page.evaluate(`(() => { ${axe}; return axe.run(document, { resultTypes: ['violations'] }); })()`) as { violations: { id: string; nodes: { html: string; failureSummary?: string }[] }[] };
  return found.violations.map((v) => `${where} ${v.id}: ${v.nodes[0].html.slice(0, 200)} ${v.nodes[0].failureSummary ?? ''}`);
}

/** Clicks the first cell and, with shift, the last. */
async function select(page: Page, from: [number, number], to = from): Promise<void> {
  await cell(page, ...from).click();
  if (to !== from) await cell(page, ...to).click({ modifiers: ['Shift'] });
}

async function enter(page: Page, at: [number, number], text: string): Promise<void> {
  await cell(page, ...at).click();
  await page.keyboard.press('F2');
  await page.getByLabel('Content of the cell').fill(text);
  await page.keyboard.press('Enter');
}

describe.runIf(browserPath)('the desk in a browser', () => {
  beforeAll(async () => {
    mkdirSync(pictures, { recursive: true });
    [demo, small] = await Promise.all([startDesk(), startDesk(fileURLToPath(new URL('../corpus/features/openpyxl.xlsx', import.meta.url)))]);
  });
  afterAll(async () => {
    await Promise.all([demo?.close(), small?.close()]);
    rmSync(folder, { recursive: true });
  });

  it('opens the demo under a strict policy without a complaint, and shows its numbers as the formats say', async () => {
    const { page, complaints } = await openPage(demo);
    expect(await cell(page, 5, 4).textContent()).toBe('222.9');
    await tab(page, 'Hardness');
    expect(await cell(page, 6, 9).textContent()).toMatch(/^\d+\.\d$/);
    expect(complaints).toEqual([]);
    await page.close();
  });

  it('a person adds evidence, carries it, looks at the budget, reports, and saves the workbook with all else in it', async () => {
    const { page, complaints } = await openPage(small);
    await tab(page, 'Results');
    // evidence
    await select(page, [4, 4], [15, 4]);
    await page.getByRole('button', { name: 'Read the selection' }).click();
    await expect.poll(() => line(page).textContent()).toBe('Read as: Tolerance');
    expect(await paneText(page).locator('tbody tr').count()).toBe(5);
    await page.getByRole('button', { name: 'Write the column' }).click();
    await expect.poll(() => line(page).textContent()).toBe('u(Tolerance) written into Results!F4:F15');
    await page.screenshot({ path: join(pictures, 'evidence.png') });
    expect(await objections(page, 'evidence with its contents')).toEqual([]);
    // carry
    await step(page, '2 Carry');
    await select(page, [4, 5], [15, 5]);
    await page.getByRole('button', { name: 'Follow the selection' }).click();
    await expect.poll(() => line(page).textContent()).toMatch(/^3 groups of input cells found; 3 without evidence/);
    const volume = page.locator('fieldset', { hasText: 'Volume' });
    await volume.getByLabel('Evidence (cells with u)').fill('F4:F15');
    await page.getByRole('button', { name: 'Write the column' }).click();
    await expect.poll(() => line(page).textContent()).toBe('u(Result) written into Results!G4:G15');
    await page.screenshot({ path: join(pictures, 'carry.png') });
    expect(await objections(page, 'carry with its contents')).toEqual([]);
    // budget, live
    await step(page, '3 Budget');
    await cell(page, 5, 5).click();
    await expect.poll(() => paneText(page).locator('h2').textContent()).toBe('Results!E5');
    expect(await paneText(page).locator('svg[role="img"]').getAttribute('aria-label')).toMatch(/100\.0 %/);
    await cell(page, 6, 7).click();
    await expect.poll(() => paneText(page).locator('h2').textContent()).toBe('Results!E6');
    await page.screenshot({ path: join(pictures, 'budget.png') });
    expect(await objections(page, 'budget with its contents')).toEqual([]);
    await page.getByRole('button', { name: 'Insert into the sheet' }).click();
    await expect.poll(() => line(page).textContent()).toMatch(/^Uncertainty budget of Results!E6 written into Results!I5:T\d+$/);
    expect(await cell(page, 5, 9).textContent()).toBe('Source');
    expect(await cell(page, 6, 9).textContent()).toBe('Volume');
    await page.locator('.rootsum-pane').getByRole('button', { name: 'Undo' }).click();
    await expect.poll(() => cell(page, 5, 9).textContent()).toBe('');
    await cell(page, 6, 7).click();
    // report
    await step(page, '4 Report');
    await page.getByLabel('Unit').fill('mg/L');
    await page.getByLabel('Upper limit').fill('60');
    await page.getByLabel('Upper limit').press('Tab');
    await expect.poll(() => paneText(page).locator('tbody tr').first().textContent()).toMatch(/± .* mg\/L, k = 2(pass|fail|conditional)/);
    await page.getByRole('button', { name: 'Write the columns' }).click();
    await expect.poll(() => line(page).textContent()).toMatch(/^Result, reported, Decision, Rule written/);
    await page.screenshot({ path: join(pictures, 'report.png') });
    expect(await objections(page, 'report with its contents')).toEqual([]);
    // check
    await step(page, '5 Check');
    await page.getByRole('button', { name: 'Audit now' }).click();
    await expect.poll(() => paneText(page).textContent()).toContain('12 formulas followed, 12 agree');
    await page.screenshot({ path: join(pictures, 'check.png') });
    expect(await objections(page, 'check with its contents')).toEqual([]);
    const [planFile] = await Promise.all([page.waitForEvent('download'), page.getByRole('button', { name: 'Save the plan' }).click()]);
    await planFile.saveAs(join(folder, 'plan.json'));
    const plan = JSON.parse(readFileSync(join(folder, 'plan.json'), 'utf8')) as { columns: { header: unknown; anchor: string }[] };
    expect(plan.columns.map((c) => c.anchor)).toEqual(['F3', 'G3', 'H3', 'I3']);
    // the saved workbook
    const [download] = await Promise.all([page.waitForEvent('download'), page.getByRole('button', { name: 'Save', exact: true }).click()]);
    expect(download.suggestedFilename()).toBe('openpyxl-rootsum.xlsx');
    await download.saveAs(join(folder, 'saved.xlsx'));
    const book = openBook(readFileSync(join(folder, 'saved.xlsx')));
    const [factor, tolerance, u] = [3, 4, 7].map((col) => book.cell(0, 4, col)!.value as number);
    // E = B·C·1.5 and u(B) = D/√3
    expect(u).toBeCloseTo((factor * 1.5 * tolerance) / Math.sqrt(3), 12);
    expect(book.cell(0, 3, 7)?.value).toBe('u(Result)');
    expect(book.cell(0, 4, 7)).toMatchObject({ formula: '_xldudf_ROOTSUM_UNC_CARRY(E4:E15,B4:B15,F4:F15)', array: { dynamic: true } });
    // the plan that the pane saved gives the same bits without a browser
    const again = new OpenDesk(openBook(readFileSync(new URL('../corpus/features/openpyxl.xlsx', import.meta.url))), builtFunctions());
    const outcome = await applyPlan(again, readPlan(readFileSync(join(folder, 'plan.json'), 'utf8')));
    expect(outcome.entries.map((e) => e.state)).toEqual(['added', 'added', 'added', 'added']);
    for (let row = 3; row <= 15; row++) for (let col = 5; col <= 10; col++) expect(again.working.cell(0, row, col)?.value).toEqual(book.cell(0, row, col)?.value);
    expect(complaints).toEqual([]);
    await page.close();
  });

  it('nothing is written over without asking, and everything the pane wrote can be taken back', async () => {
    const { page } = await openPage(small);
    await tab(page, 'Results');
    await select(page, [4, 4], [15, 4]);
    await page.getByRole('button', { name: 'Read the selection' }).click();
    await page.getByLabel('Heading goes to').fill('E3');
    await page.getByRole('button', { name: 'Write the column' }).click();
    await expect.poll(() => line(page).textContent()).toMatch(/^E3, E4, E5 and 10 more are occupied\. Press again/);
    const before = await cell(page, 4, 5).textContent();
    await page.getByRole('button', { name: 'Write the column' }).click();
    await expect.poll(() => line(page).textContent()).toBe('u(Tolerance) written into Results!E4:E15');
    expect(await cell(page, 3, 5).textContent()).toBe('u(Tolerance)');
    await page.locator('.rootsum-pane').getByRole('button', { name: 'Undo' }).click();
    await expect.poll(() => cell(page, 3, 5).textContent()).toBe('Result');
    expect(await cell(page, 4, 5).textContent()).toBe(before);
    expect(await cell(page, 9, 5).textContent()).not.toBe('');
    await page.close();
  });

  it('edits by keys: constants, formulas that recalculate, completion, errors with their words, undo, fill down', async () => {
    const { page } = await openPage(small);
    await tab(page, 'Results');
    await enter(page, [4, 2], '20');
    await expect.poll(() => cell(page, 4, 5).textContent()).toBe((20 * Number(await cell(page, 4, 3).textContent()) * 1.5).toFixed(3));
    // completion with help for the argument
    await cell(page, 4, 9).click();
    await page.keyboard.type('=stdu_from_to');
    await expect.poll(() => page.getByRole('option').first().textContent()).toMatch(/^ROOTSUM\.STDU_FROM_TOL/);
    await page.keyboard.press('Tab');
    expect(await page.getByLabel('Content of the cell').inputValue()).toBe('=ROOTSUM.STDU_FROM_TOL(');
    expect(await page.locator('.hint').textContent()).toMatch(/tolerance/);
    await page.keyboard.type('D4)');
    await page.keyboard.press('Enter');
    await expect.poll(() => cell(page, 4, 9).textContent()).toMatch(/^0\.\d+/);
    // an error has its words on hover and when the cell is reached
    await enter(page, [5, 9], '=ROOTSUM.STDU_FROM_TOL(-1)');
    await expect.poll(() => cell(page, 5, 9).textContent()).toBe('#VALUE!');
    expect(await cell(page, 5, 9).getAttribute('title')).toMatch(/^STDU_FROM_TOL: tolerance must be/);
    await cell(page, 5, 9).click();
    await expect.poll(() => page.locator('.status').textContent()).toMatch(/^STDU_FROM_TOL: tolerance must be/);
    // fill down, then back
    await select(page, [4, 9], [8, 9]);
    await page.keyboard.press('Control+d');
    await expect.poll(() => cell(page, 8, 9).textContent()).toMatch(/^0\.\d+/);
    await cell(page, 8, 9).focus();
    await page.keyboard.press('Control+z');
    await expect.poll(() => cell(page, 8, 9).textContent()).toBe('');
    await page.close();
  });

  it('the pane is used by keys alone, and keeps its borders in high contrast', async () => {
    const { page } = await openPage(small, { forcedColors: 'active' });
    await page.locator('.rootsum-pane').getByRole('tab', { name: '1 Evidence' }).focus();
    for (const title of ['2 Carry', '3 Budget', '4 Report', '5 Check', '1 Evidence']) {
      await page.keyboard.press('ArrowRight');
      expect(await page.evaluate(() => document.activeElement?.textContent)).toBe(title);
      expect(await page.locator('.rootsum-pane .panel').getAttribute('aria-labelledby')).toBe(await page.evaluate(() => document.activeElement!.id));
    }
    const reached = new Set<string>();
    for (let i = 0; i < 14; i++) {
      await page.keyboard.press('Tab');
      reached.add(await page.evaluate(() => (document.activeElement as HTMLInputElement).labels?.[0]?.textContent ?? document.activeElement?.textContent ?? ''));
    }
    for (const name of ['Read the selection', 'Cells', 'They are', 'Shape', 'Heading goes to', 'Write the column', 'Undo']) expect([...reached]).toContain(name);
    await page.screenshot({ path: join(pictures, 'contrast.png') });
    await page.close();
  });

  it('copies and pastes as text with tabs', async () => {
    const { page } = await openPage(small);
    await tab(page, 'Results');
    await select(page, [4, 1], [5, 2]);
    const copied = await page.evaluate(() => {
      const data = new DataTransfer();
      document.activeElement!.dispatchEvent(new ClipboardEvent('copy', { clipboardData: data, bubbles: true, cancelable: true }));
      return data.getData('text/plain');
    });
    expect(copied.split('\n').map((l) => l.split('\t').length)).toEqual([2, 2]);
    await cell(page, 20, 9).click();
    await page.evaluate(() => {
      const data = new DataTransfer();
      data.setData('text/plain', '1.5\tone\r\n=I20*2\t"two\nlines"\r\n');
      document.activeElement!.dispatchEvent(new ClipboardEvent('paste', { clipboardData: data, bubbles: true, cancelable: true }));
    });
    await expect.poll(() => cell(page, 21, 9).textContent()).toBe('3');
    expect(await cell(page, 21, 10).textContent()).toBe('two\nlines');
    await page.close();
  });

  it('opens a workbook that is dropped or chosen, and refuses one in words without losing the one that is open', async () => {
    const { page } = await openPage(demo);
    await page.setInputFiles('#file', { name: 'no.xlsx', mimeType: 'application/octet-stream', buffer: Buffer.from('this is no workbook') });
    await expect.poll(() => page.locator('.status').textContent()).toBe('no.xlsx was not opened: the file is not a zip archive, so it is not an .xlsx workbook');
    expect(await page.locator('.book').textContent()).toBe('demo.xlsx');
    await page.setInputFiles('#file', fileURLToPath(new URL('../corpus/books/gradebook-xlsxwriter.xlsx', import.meta.url)));
    await expect.poll(() => page.locator('.book').textContent()).toBe('gradebook-xlsxwriter.xlsx');
    await page.close();
  });

  it('does not drop changes that are not saved without saying so', async () => {
    const { page } = await openPage(small);
    await tab(page, 'Results');
    await enter(page, [4, 2], '20');
    await expect.poll(() => page.locator('.status').textContent()).toBe('');
    const other = fileURLToPath(new URL('../corpus/books/loan-xlsxwriter.xlsx', import.meta.url));
    await page.setInputFiles('#file', other);
    await expect.poll(() => page.locator('.status').textContent()).toBe('openpyxl.xlsx has changes that are not saved: save it first, or open loan-xlsxwriter.xlsx once more to leave them');
    await Promise.all([page.waitForEvent('download'), page.getByRole('button', { name: 'Save', exact: true }).click()]);
    await page.setInputFiles('#file', other);
    await expect.poll(() => page.locator('.book').textContent()).toBe('loan-xlsxwriter.xlsx');
    expect(await page.title()).toBe('loan-xlsxwriter.xlsx · Rootsum desk');
    await page.close();
  });

  it('walks through 50,000 rows by keys, drawing those in view alone', async () => {
    const { page } = await openPage(demo);
    await page.setInputFiles('#file', { name: 'long.xlsx', mimeType: 'application/octet-stream', buffer: Buffer.from(longBook(50_000)) });
    await expect.poll(() => page.locator('.book').textContent(), { timeout: 20_000 }).toBe('long.xlsx');
    await cell(page, 1, 1).click();
    await page.keyboard.press('Control+End');
    await expect.poll(() => cell(page, 50_000, 3).textContent()).toBe('150000');
    expect(await page.locator('td[data-col="1"]').count()).toBeLessThan(80);
    // the headings of rows and columns stay where they are
    const scroller = (await page.locator('.scroller').boundingBox())!;
    const corner = (await page.locator('th.corner').boundingBox())!;
    expect([Math.round(corner.x - scroller.x), Math.round(corner.y - scroller.y)]).toEqual([0, 0]);
    for (let i = 0; i < 20; i++) await page.keyboard.press('PageUp');
    const row = await page.evaluate(() => Number((document.activeElement as HTMLElement).dataset.row));
    expect(row).toBeLessThan(49_700);
    expect(await page.getByLabel('Content of the cell').inputValue()).toMatch(/^=A\d+\+B\d+$/);
    await page.close();
  });

  it('shows the demo with its uncertainty columns, for the README', async () => {
    const desk = new OpenDesk(openBook(buildDemoBook()), builtFunctions());
    await applyPlan(desk, readPlan(JSON.stringify(demoPlan)));
    writeFileSync(join(folder, 'demo-laboratory.xlsx'), desk.write());
    const served = await startDesk(join(folder, 'demo-laboratory.xlsx'));
    for (const colorScheme of ['light', 'dark'] as const) {
      const { page } = await openPage(served, { colorScheme, viewport: { width: 1360, height: 760 } });
      await tab(page, 'Hardness');
      await step(page, '3 Budget');
      await cell(page, 7, 9).click();
      await expect.poll(() => paneText(page).locator('h2').textContent()).toBe('Hardness!I7');
      expect(await paneText(page).locator('svg rect.bar').count()).toBe(9);
      await page.screenshot({ path: join(pictures, `readme-${colorScheme}.png`) });
      await page.close();
    }
    await served.close();
  });

  describe.each(['light', 'dark'] as const)('%s', (scheme) => {
    it('every view passes the accessibility rules, at both widths', async () => {
      const { page } = await openPage(small, { colorScheme: scheme });
      await tab(page, 'Results');
      for (const [name, width] of [['wide', 1440], ['narrow', 700], ['least', 320]] as const) {
        await page.setViewportSize({ width, height: 900 });
        for (const title of ['1 Evidence', '2 Carry', '3 Budget', '4 Report', '5 Check']) {
          await step(page, title);
          if (title === '2 Carry') {
            await page.getByLabel('Results', { exact: true }).fill('Results!E4:E8');
            await page.getByLabel('Results', { exact: true }).press('Tab');
            await expect.poll(() => page.locator('fieldset').count()).toBeGreaterThan(0);
          }
          expect(await objections(page, `${title} ${name}`)).toEqual([]);
          await page.screenshot({ path: join(pictures, `${title.slice(2).toLowerCase()}-${scheme}-${name}.png`) });
        }
      }
      await page.close();
    });
  });
});
