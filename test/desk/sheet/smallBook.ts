import { strToU8, zipSync } from 'fflate';

/** A cell: a number, a text, a formula with its stored value, or `null` in place of the value for none. */
export type SmallCell = number | string | { f: string; v?: number | string | null; error?: string; spill?: string; legacy?: string } | { error: string } | { part: number };

export interface SmallSheet {
  readonly cells: Readonly<Record<string, SmallCell>>;
  readonly merges?: readonly string[];
}

/** The bytes of a workbook with the given sheets, written as a spreadsheet program would. */
export function smallBook(sheets: Readonly<Record<string, SmallSheet['cells'] | SmallSheet>>, names: Readonly<Record<string, string>> = {}, calculation = ''): Uint8Array {
  const list = Object.entries(sheets).map(([name, given]) => ({ name, sheet: (isSheet(given) ? given : { cells: given }) as SmallSheet }));
  const numbers = list.map((_, i) => i + 1);
  const parts: Record<string, string> = {
    '[Content_Types].xml': `${HEAD}<Types xmlns="http://schemas.openxmlformats.org/package/2006/content-types"><Default Extension="rels" ContentType="application/vnd.openxmlformats-package.relationships+xml"/><Default Extension="xml" ContentType="application/xml"/><Override PartName="/xl/workbook.xml" ContentType="${MAIN}.sheet.main+xml"/><Override PartName="/xl/metadata.xml" ContentType="${MAIN}.sheetMetadata+xml"/>${numbers.map((n) => `<Override PartName="/xl/worksheets/sheet${n}.xml" ContentType="${MAIN}.worksheet+xml"/>`).join('')}</Types>`,
    '_rels/.rels': relations([['officeDocument', 'xl/workbook.xml']]),
    'xl/_rels/workbook.xml.rels': relations([...numbers.map((n): [string, string] => ['worksheet', `worksheets/sheet${n}.xml`]), ['sheetMetadata', 'metadata.xml']]),
    'xl/metadata.xml': `${HEAD}<metadata xmlns="${NS}" xmlns:xda="http://schemas.microsoft.com/office/spreadsheetml/2017/dynamicarray"><metadataTypes count="1"><metadataType name="XLDAPR" minSupportedVersion="120000" copy="1" pasteAll="1" pasteValues="1" merge="1" splitFirst="1" rowColShift="1" clearFormats="1" clearComments="1" assign="1" coerce="1" cellMeta="1"/></metadataTypes><futureMetadata name="XLDAPR" count="1"><bk><extLst><ext uri="{bdbb8cdc-fa1e-496e-a857-3c3f30c029c3}"><xda:dynamicArrayProperties fDynamic="1" fCollapsed="0"/></ext></extLst></bk></futureMetadata><cellMetadata count="1"><bk><rc t="1" v="0"/></bk></cellMetadata></metadata>`,
    'xl/workbook.xml': `${HEAD}<workbook xmlns="${NS}" xmlns:r="http://schemas.openxmlformats.org/officeDocument/2006/relationships"><sheets>${list.map(({ name }, i) => `<sheet name="${escape(name)}" sheetId="${i + 1}" r:id="rId${i + 1}"/>`).join('')}</sheets>${Object.keys(names).length > 0 ? `<definedNames>${Object.entries(names).map(([name, formula]) => `<definedName name="${name}">${escape(formula)}</definedName>`).join('')}</definedNames>` : ''}${calculation}</workbook>`,
  };
  list.forEach(({ sheet }, i) => (parts[`xl/worksheets/sheet${i + 1}.xml`] = sheetXml(sheet)));
  return zipSync(Object.fromEntries(Object.entries(parts).map(([name, text]) => [name, strToU8(text)])));
}

const HEAD = '<?xml version="1.0" encoding="UTF-8" standalone="yes"?>\n';
const NS = 'http://schemas.openxmlformats.org/spreadsheetml/2006/main';
const MAIN = 'application/vnd.openxmlformats-officedocument.spreadsheetml';

const isSheet = (given: SmallSheet['cells'] | SmallSheet): given is SmallSheet => 'cells' in given && typeof given.cells === 'object';

function relations(list: [kind: string, target: string][]): string {
  const one = ([kind, target]: [string, string], i: number): string =>
    `<Relationship Id="rId${i + 1}" Type="http://schemas.openxmlformats.org/officeDocument/2006/relationships/${kind}" Target="${target}"/>`;
  return `${HEAD}<Relationships xmlns="http://schemas.openxmlformats.org/package/2006/relationships">${list.map(one).join('')}</Relationships>`;
}

function sheetXml({ cells, merges = [] }: SmallSheet): string {
  const rows = new Map<number, [col: number, xml: string][]>();
  for (const [address, cell] of Object.entries(cells)) {
    const [, letters, digits] = /^([A-Z]+)(\d+)$/.exec(address)!;
    const col = [...letters].reduce((n, l) => n * 26 + l.charCodeAt(0) - 64, 0);
    const row = Number(digits);
    rows.set(row, [...(rows.get(row) ?? []), [col, cellXml(address, cell)]]);
  }
  const data = [...rows].sort(([a], [b]) => a - b).map(([row, list]) => `<row r="${row}">${list.sort(([a], [b]) => a - b).map(([, xml]) => xml).join('')}</row>`);
  const merged = merges.length > 0 ? `<mergeCells count="${merges.length}">${merges.map((ref) => `<mergeCell ref="${ref}"/>`).join('')}</mergeCells>` : '';
  return `${HEAD}<worksheet xmlns="${NS}"><sheetData>${data.join('')}</sheetData>${merged}</worksheet>`;
}

function cellXml(address: string, cell: SmallCell): string {
  if (typeof cell === 'number') return `<c r="${address}"><v>${cell}</v></c>`;
  if (typeof cell === 'string') return `<c r="${address}" t="inlineStr"><is><t>${escape(cell)}</t></is></c>`;
  if ('part' in cell) return `<c r="${address}"><v>${cell.part}</v></c>`;
  if (!('f' in cell)) return `<c r="${address}" t="e"><v>${cell.error}</v></c>`;
  const { f, v, error, spill, legacy } = cell;
  const array = spill ?? legacy;
  const formula = `<f${array ? ` t="array" ref="${array}"` : ''}>${escape(f)}</f>`;
  const value = error ?? v;
  const type = error ? ' t="e"' : typeof v === 'string' ? ' t="str"' : '';
  return `<c r="${address}"${spill ? ' cm="1"' : ''}${type}>${formula}${value == null ? '' : `<v>${escape(String(value))}</v>`}</c>`;
}

const escape = (text: string): string => text.replace(/&/g, '&amp;').replace(/</g, '&lt;').replace(/>/g, '&gt;').replace(/"/g, '&quot;');
