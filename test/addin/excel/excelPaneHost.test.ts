import { describe, expect, it } from 'vitest';
import { connect } from '../../../addin/excel/connect';
import { excelPaneHost } from '../../../addin/excel/excelPaneHost';
import { excelPort } from '../../../addin/excel/excelPort';
import { manifestSource } from '../../../manifest/source';
import type { PortArea } from '../../../functions/workbook';
import { callOn } from '../../functions/carry/callOn';
import { fakeExcel } from './fakeExcel';
import type { FakeCell } from './fakeExcel';

describe('Excel as the host of the pane', () => {
  it('writes a step and takes it back, cell by cell', async () => {
    const excel = fakeExcel({ sheets: { S: { cells: { A1: 'old', A2: { f: '=1+1', v: 2 } } } }, selected: "S!B2:C4" });
    const host = excelPaneHost(excelPort(excel.run), '.', excel.run);
    expect(await host.selection()).toEqual({ sheet: 'S', row: 2, col: 2, rows: 3, cols: 2 });
    const step = await host.write([{ sheet: 'S', row: 1, col: 1, value: 'u' }, { sheet: 'S', row: 2, col: 1, formula: '=ROOTSUM.STDU_FROM_TOL(B2:B3)', spill: { rows: 2, cols: 1 }, numberFormat: '0.00' }, { sheet: 'S', row: 5, col: 5, value: 7 }]);
    expect(['A1', 'A2', 'E5'].map((c) => excel.text('S', c))).toEqual(['u', '=ROOTSUM.STDU_FROM_TOL(B2:B3)', 7]);
    expect(host.stands(step)).toBe(true);
    expect(await host.undo()).toBe(true);
    expect(host.stands(step)).toBe(false);
    expect(['A1', 'A2', 'E5'].map((c) => excel.text('S', c))).toEqual(['old', '=1+1', '']);
    expect(await host.undo()).toBe(false);
  });

  it('takes back what reads like something else: texts that begin with = or look like numbers, cells for texts', async () => {
    const before = { A1: '=A9', A2: '0012', A3: '1-2', A4: { f: '=1+1', v: 2 }, A5: true, A6: 3.5 } as const;
    const excel = fakeExcel({ sheets: { S: { cells: { ...before }, formats: { A2: '@', A6: '0.00' } } } });
    const host = excelPaneHost(excelPort(excel.run), '.', excel.run);
    const cells = Object.keys(before);
    const all = () => cells.map((c) => [excel.text('S', c), excel.format('S', c)]);
    const first = all();
    await host.write(cells.map((_, i) => ({ sheet: 'S', row: i + 1, col: 1, value: i, numberFormat: '0.0' })));
    expect(all()).toEqual(cells.map((_, i) => [i, '0.0']));
    await host.undo();
    expect(all()).toEqual(first);
  });

  it('writes a heading as a text, whatever it looks like', async () => {
    const excel = fakeExcel({ sheets: { S: { cells: {} } } });
    const host = excelPaneHost(excelPort(excel.run), '.', excel.run);
    await host.write(['1-2', '=x', 'u(A)'].map((value, i) => ({ sheet: 'S', row: i + 1, col: 1, value })));
    expect(['A1', 'A2', 'A3'].map((c) => excel.text('S', c))).toEqual(['1-2', '=x', 'u(A)']);
  });

  it('formats all cells of a spill, and gives each its own format back', async () => {
    const excel = fakeExcel({ sheets: { S: { cells: {}, formats: { B2: '0%' } } } });
    const host = excelPaneHost(excelPort(excel.run), '.', excel.run);
    await host.write([{ sheet: 'S', row: 1, col: 2, formula: '=A1:A3', spill: { rows: 3, cols: 1 }, numberFormat: '0.000' }]);
    expect(['B1', 'B2', 'B3', 'B4'].map((c) => excel.format('S', c))).toEqual(['0.000', '0.000', '0.000', 'General']);
    await host.undo();
    expect(['B1', 'B2', 'B3'].map((c) => excel.format('S', c))).toEqual(['General', '0%', 'General']);
  });

  it('leaves nothing behind of a step that Excel refuses, and says why', async () => {
    const sheet = { cells: { A1: 'old' } as Record<string, FakeCell>, locked: ['A2'] };
    const excel = fakeExcel({ sheets: { S: sheet } });
    const host = excelPaneHost(excelPort(excel.run), '.', excel.run);
    await expect(host.write([{ sheet: 'S', row: 1, col: 1, value: 1 }, { sheet: 'S', row: 2, col: 1, value: 2 }])).rejects.toThrow('Excel does not allow it: the sheet or the workbook is protected');
    expect(excel.text('S', 'A1')).toBe('old');
    expect(await host.undo()).toBe(false);
  });

  it('keeps a step that could not be taken back', async () => {
    const sheet = { cells: {} as Record<string, FakeCell>, locked: [] as string[] };
    const excel = fakeExcel({ sheets: { S: sheet } });
    const host = excelPaneHost(excelPort(excel.run), '.', excel.run);
    await host.write([{ sheet: 'S', row: 1, col: 1, value: 1 }]);
    sheet.locked.push('A1');
    await expect(host.undo()).rejects.toThrow('protected');
    sheet.locked.pop();
    expect(await host.undo()).toBe(true);
    expect(excel.text('S', 'A1')).toBe('');
  });

  it('tells of changes and calculations, gathered, and of the selection, until it is told to stop', async () => {
    const excel = fakeExcel({ sheets: { S: { cells: {} } } });
    const port = excelPort(excel.run);
    const host = excelPaneHost(port, '.', excel.run);
    let [changes, moves] = [0, 0];
    const stops = [host.onChange(() => changes++), host.onSelection(() => moves++)];
    const pause = (ms: number) => new Promise((later) => setTimeout(later, ms));
    await pause(5);
    const before = port.revision();
    for (const event of ['changed', 'calculated', 'calculated', 'selection']) excel.fire(event);
    expect(port.revision()).toBeGreaterThan(before);
    await pause(200);
    expect([changes, moves]).toEqual([1, 1]);
    stops.forEach((stop) => stop());
    await pause(5);
    expect(['changed', 'calculated', 'selection'].map((event) => excel.listeners(event))).toEqual([0, 0, 0]);
  });
});

const noPane = async () => { throw new Error('the pane must not be opened'); };

/** The port, with one cell to hand over as an argument. */
const withCells = (port: ReturnType<typeof excelPort>) => ({ ...port, read: async (areas: readonly PortArea[]) => (areas[0].rows * areas[0].cols === 1 ? [{ area: areas[0], cells: [{ value: 1 }] }] : port.read(areas)) });

describe('connect', () => {
  it('outside of Excel, or in one that is too old, every reading says so', async () => {
    const none = { Office: { onReady: async () => ({ host: null }) }, RootsumPort: undefined as never as ReturnType<typeof excelPort> };
    const old = {
      Office: { onReady: async () => ({ host: 'Excel' }), context: { requirements: { isSetSupported: () => false } } },
      Excel: { run: () => { throw new Error('must not be asked'); } }, RootsumPort: undefined as never as ReturnType<typeof excelPort>,
    };
    for (const around of [none, old]) {
      expect(await connect(around, noPane)).toBe(false);
      await expect(around.RootsumPort.sheets()).rejects.toThrow('needs an Excel that tells of spills');
      expect(await callOn(withCells(around.RootsumPort), 'UNC_CARRY', ['S!A1'], ['S!A1', { literal: 0.1 }])).toEqual([['#VALUE! UNC_CARRY: needs an Excel that tells of spills and of rows that do not show (ExcelApi 1.12)']]);
    }
  });

  it('has a port at once, whose answers wait until Excel is ready', async () => {
    const excel = fakeExcel({ sheets: { S: { cells: { A1: 1 } } } });
    let ready = (_: { host: string }): void => undefined;
    const around = { Office: { onReady: () => new Promise<{ host: string }>((r) => { ready = r; }) }, Excel: undefined as unknown, RootsumPort: undefined as never as ReturnType<typeof excelPort> };
    const connecting = connect(around, noPane);
    const asked = around.RootsumPort.sheets();
    around.Excel = { run: (_options: object, batch: Parameters<typeof excel.run>[0]) => excel.run(batch) };
    ready({ host: 'Excel' });
    expect(await asked).toEqual([{ name: 'S', rows: 1, cols: 1 }]);
    expect(await connecting).toBe(true);
  });

  it('does nothing outside a host', async () => {
    const around = {};
    expect(await connect(around, noPane)).toBe(false);
    expect(around).toEqual({});
  });

  it('gives the functions their port and the decimal separator, and opens the pane where the page has one', async () => {
    const excel = fakeExcel({ sheets: { S: { cells: { A1: 1 } } }, decimalSeparator: ',' });
    const opened: unknown[] = [];
    const actions = new Map<string, (event: { completed(): void }) => void>();
    const around: Record<string, unknown> = { Office: { onReady: async () => ({ host: 'Excel' }), actions: { associate: (id: string, action: () => void) => actions.set(id, action) } }, open: (page: string) => opened.push(page), Excel: { run: (_options: object, batch: Parameters<typeof excel.run>[0]) => excel.run(batch) }, document: { getElementById: (id: string) => ({ id }) } };
    expect(await connect(around, async () => ({ mountPane: (root, host) => opened.push([root, host.decimalSeparator]) }))).toBe(true);
    expect(around.RootsumHost).toEqual({ decimalSeparator: ',' });
    expect(await (around.RootsumPort as ReturnType<typeof excelPort>).sheets()).toEqual([{ name: 'S', rows: 1, cols: 1 }]);
    expect(opened).toEqual([[{ id: 'pane' }, ',']]);
    // the buttons of the ribbon, by the names in the manifest
    expect([...actions.keys()].sort()).toEqual(manifestSource().ribbon.commands.map((c) => c.action).sort());
    let done = 0;
    actions.get('rootsumReference')!({ completed: () => done++ });
    expect([opened.at(-1), done]).toEqual(['reference.html', 1]);
    await new Promise<void>((completed) => actions.get('rootsumTakeBack')!({ completed }));
  });
});
