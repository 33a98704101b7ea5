import { translateFormulaToR1C1 } from '@borgar/fx';
import type { Run } from '../../../addin/excel/excelPort';

/** A cell of the fake: a constant, or a formula (A1, with its "=") and what it shows. */
export type FakeCell = number | string | boolean | { readonly f: string; readonly v: number | string | boolean | { readonly error: string } };

export interface FakeSheet {
  readonly cells: Record<string, FakeCell>;
  /** Spills by their anchors: `{ B2: [3, 1] }`. */
  readonly spills?: Readonly<Record<string, readonly [rows: number, cols: number]>>;
  readonly hiddenRows?: readonly number[];
  /** Rows below the heading of a filter in force. */
  readonly filtered?: { readonly first: number; readonly rows: number };
  readonly isProtected?: boolean;
  /** Cells whose formula is hidden once the sheet is protected. */
  readonly hiddenFormulas?: readonly string[];
}

export interface FakeBook {
  readonly sheets: Readonly<Record<string, FakeSheet>>;
  readonly names?: readonly { readonly name: string; readonly formula: string; readonly sheet?: string }[];
  readonly tables?: readonly { readonly name: string; readonly address: string; readonly columns: readonly string[]; readonly showTotals?: boolean }[];
  readonly selected?: string;
  readonly decimalSeparator?: string;
}

/**
 * A workbook behind the habits of Office.js: an object's property may be read only after it was asked for by `load` and a `sync` has
 * passed; what is written takes effect with the next `sync`. Round trips are counted.
 */
export function fakeExcel(book: FakeBook): { readonly run: Run; readonly count: { syncs: number; runs: number }; readonly text: (sheet: string, cell: string) => unknown } {
  const count = { syncs: 0, runs: 0 };
  const formats = new Map<string, string>();
  const run: Run = async (batch) => {
    count.runs++;
    const queue: (() => void)[] = [];
    const context = {
      sync: async () => {
        count.syncs++;
        for (const action of queue.splice(0)) action();
      },
    };
    return batch(Object.assign(context, { workbook: workbook(book, queue, context, formats) }) as never);
  };
  return { run, count, text: (sheet, cell) => contentOf(book.sheets[sheet], cell).formula };
}

type Queue = (() => void)[];

/** An object whose properties are given by functions and throw until they were loaded. */
function lazy(queue: Queue, properties: Record<string, () => unknown>, rest: Record<string, unknown> = {}): Record<string, unknown> {
  const loaded = new Map<string, unknown>();
  const object: Record<string, unknown> = {
    ...rest,
    load: (wanted: string | string[]) => {
      const list = Array.isArray(wanted) ? wanted : wanted.split(',').map((w) => w.trim());
      queue.push(() => {
        for (const path of list) {
          const name = path.split('/')[0];
          if (!(name in properties)) throw new Error(`the host does not know the property ${name}`);
          loaded.set(name, properties[name]());
          if (path.includes('/')) (object[`load_${name}`] as ((sub: string) => void) | undefined)?.(path.split('/')[1]);
        }
        if ('isNull' in properties) loaded.set('isNullObject', properties.isNull());
      });
    },
  };
  for (const name of [...Object.keys(properties), 'isNullObject']) {
    Object.defineProperty(object, name, {
      get: () => {
        if (!loaded.has(name)) throw new Error(`The property '${name}' is not available. Before reading the property's value, call the load method and sync`);
        return loaded.get(name);
      },
      set: (value: unknown) => queue.push(() => { (rest[`set_${name}`] as (v: unknown) => void)(value); loaded.set(name, value); }),
      enumerable: true,
    });
  }
  return object;
}

const cellOf = (name: string): [row: number, col: number] => {
  const [, letters, digits] = /^([A-Z]+)(\d+)$/.exec(name)!;
  return [Number(digits), [...letters].reduce((n, l) => n * 26 + l.charCodeAt(0) - 64, 0)];
};
const nameOf = (row: number, col: number): string => {
  let letters = '';
  for (let n = col; n > 0; n = Math.floor((n - 1) / 26)) letters = String.fromCharCode(65 + ((n - 1) % 26)) + letters;
  return `${letters}${row}`;
};

function contentOf(sheet: FakeSheet, name: string): { formula: unknown; value: unknown; type: string } {
  const cell = sheet.cells[name];
  if (cell === undefined) return { formula: '', value: '', type: 'Empty' };
  const value = typeof cell === 'object' ? cell.v : cell;
  const shown = typeof value === 'object' ? value.error : value;
  const type = typeof value === 'object' ? 'Error' : typeof value === 'number' ? 'Double' : typeof value === 'boolean' ? 'Boolean' : 'String';
  const hides = sheet.isProtected && sheet.hiddenFormulas?.includes(name);
  return { formula: typeof cell === 'object' && !hides ? cell.f : shown, value: shown, type };
}

function workbook(book: FakeBook, queue: Queue, context: object, formats: Map<string, string>): Record<string, unknown> {
  const sheets = Object.entries(book.sheets).map(([name, sheet]) => sheetOf(name, sheet, queue, formats));
  const byName = (name: string): unknown => sheets[Object.keys(book.sheets).indexOf(name)];
  const named = (sheet: string | undefined) => lazy(queue, { items: () => (book.names ?? []).filter((n) => n.sheet === sheet) });
  Object.keys(book.sheets).forEach((name, i) => { sheets[i].names = named(name); });
  const tables = (book.tables ?? []).map((t) => lazy(queue, { name: () => t.name, showHeaders: () => true, showTotals: () => t.showTotals ?? false }, {
    getRange: () => lazy(queue, { address: () => t.address }), columns: lazy(queue, { items: () => t.columns.map((name) => ({ name })) }),
  }));
  const events = { add: () => ({ remove: () => undefined, context }) };
  return lazy(queue, {}, {
    worksheets: lazy(queue, { items: () => sheets.map((s) => { (s.load as (p: string) => void)('name'); queue.splice(0).forEach((a) => a()); return s; }) }, { getItem: byName, onChanged: events }),
    names: named(undefined),
    tables: lazy(queue, { items: () => tables.map((t) => { (t.load as (p: string) => void)('name, showHeaders, showTotals'); queue.splice(0).forEach((a) => a()); return t; }) }),
    getSelectedRange: () => lazy(queue, { address: () => book.selected ?? Object.keys(book.sheets)[0] + '!A1' }),
    onSelectionChanged: events,
    application: { cultureInfo: { numberFormat: lazy(queue, { numberDecimalSeparator: () => book.decimalSeparator ?? '.' }) } },
  });
}

function sheetOf(name: string, sheet: FakeSheet, queue: Queue, formats: Map<string, string>): Record<string, unknown> {
  const used = (): [number, number] => Object.keys(sheet.cells).map(cellOf).reduce(([r, c], [a, b]) => [Math.max(r, a), Math.max(c, b)], [0, 0]);
  const spillOf = (row: number, col: number) => Object.entries(sheet.spills ?? {}).map(([anchor, [rows, cols]]) => ({ at: cellOf(anchor), rows, cols }))
    .find(({ at, rows, cols }) => row >= at[0] && row < at[0] + rows && col >= at[1] && col < at[1] + cols);

  const range = (row: number, col: number, rows: number, cols: number): Record<string, unknown> => {
    const grid = <T>(of: (r: number, c: number) => T): T[][] => Array.from({ length: rows }, (_, r) => Array.from({ length: cols }, (_x, c) => of(row + r, col + c)));
    const at = (r: number, c: number) => contentOf(sheet, nameOf(r, c));
    const r1c1 = (r: number, c: number): unknown => {
      const { formula, value } = at(r, c);
      return typeof formula === 'string' && formula.startsWith('=') && formula !== value ? translateFormulaToR1C1(formula, nameOf(r, c)) : formula;
    };
    const some = grid((r, c) => spillOf(r, c) !== undefined).flat();
    const hides = grid((r, c) => sheet.hiddenFormulas?.includes(nameOf(r, c)) ?? false).flat();
    const [lastRow] = used();
    return lazy(queue, {
      isNull: () => lastRow === 0, rowIndex: () => row - 1, columnIndex: () => col - 1, rowCount: () => rows, columnCount: () => cols,
      formulasR1C1: () => grid(r1c1), formulas: () => grid((r, c) => at(r, c).formula), values: () => grid((r, c) => at(r, c).value), valueTypes: () => grid((r, c) => at(r, c).type),
      hasSpill: () => (some.every((s) => s) ? true : some.some((s) => s) ? null : false),
      numberFormat: () => grid((r, c) => formats.get(`${name}!${nameOf(r, c)}`) ?? 'General'), address: () => `${name}!${nameOf(row, col)}`,
    }, {
      getColumn: (c: number) => range(row, col + c, rows, 1),
      getCell: (r: number, c: number) => range(row + r, col + c, 1, 1),
      getSpillingToRangeOrNullObject: () => {
        const spill = spillOf(row, col);
        const anchors = spill && spill.at[0] === row && spill.at[1] === col;
        return lazy(queue, { isNull: () => !anchors, rowCount: () => spill?.rows, columnCount: () => spill?.cols });
      },
      getSpillParentOrNullObject: () => {
        const spill = spillOf(row, col);
        return lazy(queue, { isNull: () => !spill, rowIndex: () => spill && spill.at[0] - 1, columnIndex: () => spill && spill.at[1] - 1 });
      },
      format: { protection: lazy(queue, { formulaHidden: () => (hides.every((h) => h) ? true : hides.some((h) => h) ? null : false) }) },
      getCellProperties: () => later(queue, () => grid((r, c) => ({ format: { protection: { formulaHidden: sheet.hiddenFormulas?.includes(nameOf(r, c)) ?? false } } }))),
      getRowProperties: () => later(queue, () => Array.from({ length: lastRow }, (_, r) => ({ rowHidden: sheet.hiddenRows?.includes(r + 1) ?? false }))),
      select: () => undefined,
      set_formulas: (values: unknown[][]) => values.forEach((line, r) => line.forEach((v, c) => {
        const key = nameOf(row + r, col + c);
        if (v === '') delete sheet.cells[key];
        else sheet.cells[key] = (typeof v === 'string' && v.startsWith('=') ? { f: v, v: 0 } : v) as FakeCell;
      })),
      set_numberFormat: (values: string[][]) => grid((r, c) => formats.set(`${name}!${nameOf(r, c)}`, values.length === 1 ? values[0][0] : values[r - row][c - col])),
    });
  };
  return lazy(queue, { name: () => name }, {
    getRangeByIndexes: (r: number, c: number, rows: number, cols: number) => range(r + 1, c + 1, rows, cols),
    getUsedRangeOrNullObject: () => range(1, 1, ...used()),
    protection: lazy(queue, { protected: () => sheet.isProtected ?? false }),
    autoFilter: lazy(queue, { isDataFiltered: () => sheet.filtered !== undefined }, {
      getRangeOrNullObject: () => lazy(queue, { isNull: () => !sheet.filtered, rowIndex: () => sheet.filtered && sheet.filtered.first - 1, rowCount: () => sheet.filtered?.rows }),
    }),
    tables: lazy(queue, { items: () => [] }),
    activate: () => undefined,
  });
}

/** A result that is there after the next sync. */
function later<T>(queue: Queue, of: () => T): { readonly value: T } {
  let ready: { value: T } | undefined;
  queue.push(() => { ready = { value: of() }; });
  return { get value() { if (!ready) throw new Error('the result is not there before sync'); return ready.value; } };
}
