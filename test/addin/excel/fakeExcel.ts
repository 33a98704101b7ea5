import { translateFormulaToR1C1 } from '@borgar/fx';
import type { Run } from '../../../addin/excel/run';
import { parseAddress } from '../../../functions/address';

/** A cell of the fake: a constant, or a formula (A1, with its "=") and what it shows. */
export type FakeCell = number | string | boolean | { readonly f: string; readonly v: number | string | boolean | { readonly error: string } };

export interface FakeSheet {
  readonly cells: Record<string, FakeCell>;
  /** Spills by their anchors: `{ B2: [3, 1] }`. */
  readonly spills?: Readonly<Record<string, readonly [rows: number, cols: number]>>;
  /** Array formulas of before by their first cells: every cell shows the same formula, as Excel does. */
  readonly legacy?: Readonly<Record<string, readonly [rows: number, cols: number]>>;
  /** Cells that are saved as array formulas though they stand for themselves. */
  readonly saved?: readonly string[];
  readonly hiddenRows?: readonly number[];
  /** Rows below the heading of a filter in force. */
  readonly filtered?: { readonly first: number; readonly rows: number };
  readonly isProtected?: boolean;
  /** Cells whose formula is hidden once the sheet is protected. */
  readonly hiddenFormulas?: readonly string[];
  readonly formats?: Readonly<Record<string, string>>;
  /** Cells that cannot be written. */
  readonly locked?: readonly string[];
}

export interface FakeBook {
  readonly sheets: Readonly<Record<string, FakeSheet>>;
  readonly names?: readonly { readonly name: string; readonly formula: string; readonly sheet?: string }[];
  readonly tables?: readonly { readonly name: string; readonly address: string; readonly columns: readonly string[]; readonly showTotals?: boolean; readonly isFiltered?: boolean }[];
  readonly selected?: string;
  readonly decimalSeparator?: string;
  /** The most cells that one round trip takes. */
  readonly mostCells?: number;
}

/**
 * A workbook behind the habits of Office.js: an object's property may be read only after it was asked for by `load` and a `sync` has
 * passed; what is written takes effect with the next `sync`; what follows a refused request is not done. Round trips are counted.
 */
export function fakeExcel(book: FakeBook) {
  const count = { syncs: 0, runs: 0 };
  const handlers = new Map<string, Set<() => unknown>>();
  const formats = new Map(Object.entries(book.sheets).flatMap(([name, { formats: given = {} }]) => Object.entries(given).map(([cell, format]) => [`${name}!${cell}`, format])));
  const run: Run = async (batch) => {
    count.runs++;
    const queue: Queue = Object.assign([], { cells: 0 });
    const context = {
      sync: async () => {
        count.syncs++;
        queue.cells = 0;
        for (const action of queue.splice(0)) action();
        if (queue.cells > (book.mostCells ?? Infinity)) throw refused('ResponsePayloadSizeLimitExceeded', 'The response payload size has exceeded the limit.');
      },
    };
    return batch(Object.assign(context, { workbook: workbook(book, queue, context, formats, handlers) }) as never);
  };
  return {
    run, count,
    text: (sheet: string, cell: string): unknown => contentOf(book.sheets[sheet], cell).formula,
    format: (sheet: string, cell: string): string => formats.get(`${sheet}!${cell}`) ?? 'General',
    /** Tells whoever listens. */
    fire: (event: string): void => handlers.get(event)?.forEach((handler) => handler()),
    listeners: (event: string): number => handlers.get(event)?.size ?? 0,
  };
}

/** What Office.js throws. */
const refused = (code: string, message: string): Error => Object.assign(new Error(message), { code });

type Queue = (() => void)[] & { cells: number };

/** Loads a property at once, for the items of a collection. */
const TAKE = Symbol('take');

/** An object whose properties are given by functions and throw until they were loaded. */
function lazy(queue: Queue, properties: Record<string, () => unknown>, rest: Record<string, unknown> = {}): Record<string, unknown> {
  const loaded = new Map<string, unknown>();
  const take = (path: string): void => {
    const [name, ...below] = path.split('/');
    if (!(name in properties)) throw refused('InvalidArgument', `the host does not know the property ${name}`);
    loaded.set(name, properties[name]());
    if (below.length > 0) for (const item of loaded.get(name) as { [TAKE](path: string): void }[]) item[TAKE](below.join('/'));
    if ('isNull' in properties) loaded.set('isNullObject', properties.isNull());
  };
  const object: Record<string | symbol, unknown> = {
    ...rest,
    [TAKE]: take,
    load: (wanted: string | string[]) => {
      const list = Array.isArray(wanted) ? wanted : wanted.split(',').map((w) => w.trim());
      queue.push(() => {
        queue.cells += Number(rest.size ?? 0);
        list.forEach(take);
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

function workbook(book: FakeBook, queue: Queue, context: object, formats: Map<string, string>, handlers: Map<string, Set<() => unknown>>): Record<string, unknown> {
  const event = (name: string) => ({
    add: (handler: () => unknown) => {
      const list = handlers.get(name) ?? new Set();
      handlers.set(name, list);
      queue.push(() => list.add(handler));
      return { context, remove: () => queue.push(() => list.delete(handler)) };
    },
  });
  const tables = (book.tables ?? []).map((t) => {
    const { sheet, row, col, rows, cols } = parseAddress(t.address)!;
    const body = () => lazy(queue, { rowIndex: () => row, rowCount: () => rows - 1 - (t.showTotals ? 1 : 0), columnIndex: () => col - 1, columnCount: () => cols });
    const table = lazy(queue, { name: () => t.name, showHeaders: () => true, showTotals: () => t.showTotals ?? false }, {
      getRange: () => lazy(queue, { address: () => t.address, rowIndex: () => row - 1, rowCount: () => rows }), getDataBodyRange: body,
      columns: lazy(queue, { items: () => t.columns.map((name) => lazy(queue, { name: () => name })) }),
      autoFilter: lazy(queue, { isDataFiltered: () => t.isFiltered ?? false }),
    });
    return { sheet, table };
  });
  const named = (sheet: string | undefined) => {
    const items = (book.names ?? []).filter((n) => n.sheet === sheet).map((n) => lazy(queue, { name: () => n.name, formula: () => n.formula }));
    return lazy(queue, { items: () => items });
  };
  const sheets = new Map(Object.entries(book.sheets).map(([name, sheet]) => [name, Object.assign(
    sheetOf(name, sheet, queue, formats), { names: named(name), tables: lazy(queue, { items: () => tables.filter((t) => t.sheet === name).map((t) => t.table) }) },
  )]));
  const noSheet = new Proxy({}, { get: () => () => { throw refused('ItemNotFound', "The requested resource doesn't exist."); } });
  return lazy(queue, {}, {
    worksheets: lazy(queue, { items: () => [...sheets.values()] }, { getItem: (name: string) => sheets.get(name) ?? noSheet, onChanged: event('changed'), onCalculated: event('calculated') }),
    names: named(undefined),
    tables: lazy(queue, { items: () => tables.map((t) => t.table) }),
    getSelectedRange: () => lazy(queue, { address: () => book.selected ?? Object.keys(book.sheets)[0] + '!A1' }),
    onSelectionChanged: event('selection'),
    application: { cultureInfo: { numberFormat: lazy(queue, { numberDecimalSeparator: () => book.decimalSeparator ?? '.' }) } },
  });
}

/** What a cell holds once something was typed into it. */
function typed(given: unknown, format: string): FakeCell {
  if (typeof given !== 'string' || format === '@') return given as FakeCell;
  if (given.startsWith("'")) return given.slice(1);
  if (given.startsWith('=')) return { f: given, v: 0 };
  return /^[-\d. ]+$/.test(given) ? Number(given.replace(/[- ]/g, '')) : given;
}

function sheetOf(name: string, sheet: FakeSheet, queue: Queue, formats: Map<string, string>): Record<string, unknown> {
  const within = (arrays: FakeSheet['spills'], row: number, col: number) => Object.entries(arrays ?? {}).map(([anchor, [rows, cols]]) => ({ at: cellOf(anchor), rows, cols }))
    .find(({ at, rows, cols }) => row >= at[0] && row < at[0] + rows && col >= at[1] && col < at[1] + cols);

  const spillOf = (row: number, col: number) => within(sheet.spills, row, col);

  const range = (row: number, col: number, rows: number, cols: number): Record<string, unknown> => {
    const grid = <T>(of: (r: number, c: number) => T): T[][] => Array.from({ length: rows }, (_, r) => Array.from({ length: cols }, (_x, c) => of(row + r, col + c)));
    const at = (r: number, c: number) => contentOf(sheet, nameOf(r, c));
    const r1c1 = (r: number, c: number): unknown => {
      const { formula, value } = at(r, c);
      return typeof formula === 'string' && formula.startsWith('=') && formula !== value ? translateFormulaToR1C1(formula, nameOf(r, c)) : formula;
    };
    const some = grid((r, c) => spillOf(r, c) !== undefined).flat();
    const saved = grid((r, c) => (spillOf(r, c) ?? within(sheet.legacy, r, c)) !== undefined || (sheet.saved?.includes(nameOf(r, c)) ?? false)).flat();
    const hides = grid((r, c) => sheet.hiddenFormulas?.includes(nameOf(r, c)) ?? false).flat();
    return lazy(queue, {
      isNull: () => rows === 0, rowIndex: () => row - 1, columnIndex: () => col - 1, rowCount: () => rows, columnCount: () => cols,
      formulasR1C1: () => grid(r1c1), formulas: () => grid((r, c) => at(r, c).formula), values: () => grid((r, c) => at(r, c).value), valueTypes: () => grid((r, c) => at(r, c).type),
      savedAsArray: () => (saved.every((s) => s) ? true : saved.some((s) => s) ? null : false),
      hasSpill: () => (some.every((s) => s) ? true : some.some((s) => s) ? null : false),
      numberFormat: () => grid((r, c) => formats.get(`${name}!${nameOf(r, c)}`) ?? 'General'), address: () => `${name}!${nameOf(row, col)}`,
    }, {
      size: rows * cols,
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
      getRowProperties: () => later(queue, () => Array.from({ length: rows }, (_, r) => ({ rowHidden: sheet.hiddenRows?.includes(row + r) ?? false }))),
      select: () => undefined,
      set_formulas: (values: unknown[][]) => values.forEach((line, r) => line.forEach((v, c) => {
        const key = nameOf(row + r, col + c);
        if (sheet.locked?.includes(key)) throw refused('AccessDenied', 'You cannot perform the requested operation.');
        if (v === '') delete sheet.cells[key];
        else sheet.cells[key] = typed(v, formats.get(`${name}!${key}`) ?? 'General');
      })),
      set_numberFormat: (values: string[][]) => grid((r, c) => formats.set(`${name}!${nameOf(r, c)}`, values.length === 1 ? values[0][0] : values[r - row][c - col])),
    });
  };
  return lazy(queue, { name: () => name }, {
    getRangeByIndexes: (r: number, c: number, rows: number, cols: number) => range(r + 1, c + 1, rows, cols),
    // the smallest rectangle, as in Excel: it need not begin in A1; formats count unless only values are asked for
    getUsedRangeOrNullObject: (valuesOnly = false) => {
      const places = [...Object.keys(sheet.cells), ...(valuesOnly ? [] : Object.keys(sheet.formats ?? {}))].map(cellOf);
      if (places.length === 0) return range(1, 1, 0, 0);
      const [top, left, bottom, right] = [Math.min(...places.map(([r]) => r)), Math.min(...places.map(([, c]) => c)), Math.max(...places.map(([r]) => r)), Math.max(...places.map(([, c]) => c))];
      return range(top, left, bottom - top + 1, right - left + 1);
    },
    protection: lazy(queue, { protected: () => sheet.isProtected ?? false }),
    autoFilter: lazy(queue, { isDataFiltered: () => sheet.filtered !== undefined }, {
      getRangeOrNullObject: () => lazy(queue, { isNull: () => !sheet.filtered, rowIndex: () => sheet.filtered && sheet.filtered.first - 1, rowCount: () => sheet.filtered?.rows }),
    }),
    activate: () => undefined,
  });
}

/** A result that is there after the next sync. */
function later<T>(queue: Queue, of: () => T): { readonly value: T } {
  let ready: { value: T } | undefined;
  queue.push(() => { ready = { value: of() }; });
  return { get value() { if (!ready) throw new Error('the result is not there before sync'); return ready.value; } };
}
