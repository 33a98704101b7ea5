import type { TableShape } from '../engine/formula/evaluate';
import type { HiddenRows } from '../engine/formula/rowState';
import type { Area } from '../engine/formula/value';
import type { CellContent, WorkbookView } from '../engine/graph/workbookView';
import type { PortArea, PortName, PortTable, WorkbookPort } from '../workbook';

/** Cells are read in blocks of this size, one row further above and below, so that neighbours are at hand. */
const BLOCK_ROWS = 256;
const BLOCK_COLS = 16;

/** What has been read of a workbook at one moment: the engine's view, filled block by block along the frontier of what is needed. */
export class Snapshot implements WorkbookView {
  private readonly columns: Map<number, (CellContent | null)[]>[];
  private readonly places = new Map<string, number>();
  private readonly known = new Set<string>();
  private readonly wanted = new Map<string, PortArea>();
  private readonly hidden = new Map<number, HiddenRows>();
  private readonly hiddenWanted = new Set<number>();
  private readonly underWay = new Set<Promise<void>>();

  private constructor(
    private readonly port: WorkbookPort,
    readonly sheets: readonly { readonly name: string; readonly rows: number; readonly cols: number }[],
    private readonly names: readonly PortName[],
    private readonly tables: readonly PortTable[],
    readonly date1904: boolean,
  ) {
    this.columns = sheets.map(() => new Map());
    sheets.forEach((s, i) => this.places.set(s.name.toLowerCase(), i));
  }

  static async open(port: WorkbookPort): Promise<Snapshot> {
    const [sheets, names, tables, date1904] = await Promise.all([port.sheets(), port.names(), port.tables(), port.date1904()]);
    return new Snapshot(port, sheets, names, tables, date1904);
  }

  /** The index of a sheet by name, without regard to case. */
  sheetIndex(name: string): number | undefined {
    return this.places.get(name.toLowerCase());
  }

  cell(sheet: number, row: number, col: number): CellContent | null | undefined {
    const { rows, cols } = this.sheets[sheet];
    if (row > rows || col > cols) return null;
    return this.columns[sheet].get(col)?.[row];
  }

  formula(sheet: number, row: number, col: number): string | null | undefined {
    const content = this.cell(sheet, row, col);
    return content && (content.formula ?? null);
  }

  hiddenRows(sheet: number): HiddenRows | undefined {
    const known = this.hidden.get(sheet);
    if (!known) this.hiddenWanted.add(sheet);
    return known;
  }

  want(area: Area): void {
    const { rows, cols, name } = this.sheets[area.sheet];
    const lastRow = Math.min(area.r2, rows);
    const lastCol = Math.min(area.c2, cols);
    for (let i = Math.floor((area.r1 - 1) / BLOCK_ROWS); i * BLOCK_ROWS < lastRow; i++) {
      for (let j = Math.floor((area.c1 - 1) / BLOCK_COLS); j * BLOCK_COLS < lastCol; j++) {
        const key = `${area.sheet} ${i} ${j}`;
        if (this.known.has(key) || this.wanted.has(key)) continue;
        const row = Math.max(1, i * BLOCK_ROWS);
        const col = j * BLOCK_COLS + 1;
        this.wanted.set(key, {
          sheet: name, row, col,
          rows: Math.min(rows, (i + 1) * BLOCK_ROWS + 1) - row + 1,
          cols: Math.min(cols, col + BLOCK_COLS - 1) - col + 1,
        });
      }
    }
  }

  /**
   * Reads what was asked for since the last time, and waits for what other calls are reading.
   *
   * @returns false if there was neither.
   */
  async fetch(): Promise<boolean> {
    if (this.wanted.size + this.hiddenWanted.size > 0) {
      const reading = Promise.all([this.readWanted(), this.readHidden()]).then(() => {}).finally(() => this.underWay.delete(reading));
      this.underWay.add(reading);
    }
    if (this.underWay.size === 0) return false;
    await Promise.all(this.underWay);
    return true;
  }

  private async readHidden(): Promise<void> {
    const sheets = [...this.hiddenWanted];
    this.hiddenWanted.clear();
    await Promise.all(sheets.map(async (sheet) => {
      const rows = await this.port.hiddenRows(this.sheets[sheet].name);
      this.hidden.set(sheet, new Map(rows.map(({ row, filtered }) => [row, filtered ? 'filtered' : 'hidden'])));
    }));
  }

  private async readWanted(): Promise<void> {
    if (this.wanted.size === 0) return;
    const areas = [...this.wanted.values()];
    for (const key of this.wanted.keys()) this.known.add(key);
    this.wanted.clear();
    for (const { area, cells } of await this.port.read(areas)) {
      const columns = this.columns[this.places.get(area.sheet.toLowerCase())!];
      for (let c = 0; c < area.cols; c++) {
        let column = columns.get(area.col + c);
        if (!column) columns.set(area.col + c, (column = []));
        for (let r = 0; r < area.rows; r++) column[area.row + r] = cells[r * area.cols + c];
      }
    }
  }

  name(name: string, sheet: number): string | undefined {
    const key = name.toLowerCase();
    const home = this.sheets[sheet].name.toLowerCase();
    const local = this.names.find((n) => n.sheet?.toLowerCase() === home && n.name.toLowerCase() === key);
    return (local ?? this.names.find((n) => n.sheet === undefined && n.name.toLowerCase() === key))?.formula;
  }

  table(name: string, sheet: number, row: number, col: number): TableShape | undefined {
    const found = name === '' ? this.tables.find((t) => this.covers(t, sheet, row, col)) : this.tables.find((t) => t.name.toLowerCase() === name.toLowerCase());
    if (!found) return undefined;
    const { area, columns, headerRows, totalsRows } = found;
    const place = this.places.get(area.sheet.toLowerCase())!;
    return {
      area: { k: 'area', sheet: place, r1: area.row, c1: area.col, r2: area.row + area.rows - 1, c2: area.col + area.cols - 1 },
      columns, headerRows, totalsRows,
    };
  }

  private covers({ area }: PortTable, sheet: number, row: number, col: number): boolean {
    return (
      this.places.get(area.sheet.toLowerCase()) === sheet &&
      row >= area.row && row < area.row + area.rows && col >= area.col && col < area.col + area.cols
    );
  }
}
