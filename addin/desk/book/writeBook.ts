import type { Book } from './Book';
import type { Edit } from './Edit';
import { extendTable } from './extendTable';
import { METADATA_TYPE, newMetadata, withDynamicMark } from './metadata';
import { relationshipsOf } from './namespaces';
import { PartEdits } from './partEdits';
import { planEdits } from './planEdits';
import { defaultStyle } from './SheetData';
import { applySplices } from './splice';
import { writeCells } from './writeCells';
import { emptyStyles, styleWithFormat } from './writeStyles';
import { childOf, parseXml, prefixOf, withAttributes } from './xmlTree';

export interface WriteOptions {
  /** Asks the program that opens the file to calculate everything anew. */
  recalculate?: boolean;
}

/**
 * The workbook with some cells changed. Parts that no edit concerns keep their bytes; in a sheet only the changed cells are
 * replaced. The book itself stays as it was read: to see the edits, open the result. A digital signature does not survive.
 *
 * @throws BookError for an edit that would harm the workbook; all edits are checked before any is carried out.
 */
export function writeBook(book: Book, edits: readonly Edit[], options: WriteOptions = {}): Uint8Array {
  const { source } = book;
  const parts = new PartEdits(source.parts);
  const plan = planEdits(book, edits, styleAdder(book, parts));

  const dynamicMark = plan.spills ? addDynamicMark(book, parts) : 0;
  for (const [sheet, changes] of plan.sheets) {
    const { part } = book.sheets[sheet];
    const data = source.data[sheet]!;
    parts.set(part, writeCells(parts.text(part), changes, { part, dynamicMark, defaultStyle: (row, col) => defaultStyle(data, row, col) }));
  }
  for (const [table, columns] of plan.tables) parts.splice(table.part, extendTable(parts.text(table.part), table.part, columns));
  // The chain is rebuilt by whoever opens the file; one that names cells without formulas counts as damage.
  if (plan.formulasChanged && source.calcChainPart !== undefined) parts.removePart(source.calcChainPart, source.workbookPart);
  if (options.recalculate) parts.set(source.workbookPart, withFullCalculation(parts.text(source.workbookPart), source.workbookPart));
  return parts.bytes();
}

function styleAdder(book: Book, parts: PartEdits): (base: number, numberFormat: string) => number {
  const { source } = book;
  const known = new Map<string, number>();
  let part = source.stylesPart;
  return (base, numberFormat) => {
    const key = `${base} ${numberFormat}`;
    let style = known.get(key);
    if (style === undefined) {
      if (part === undefined) {
        part = parts.freeName(folderOf(source.workbookPart), 'styles');
        addPart(book, parts, part, emptyStyles(source.workbook.mainUri), STYLES_TYPE, 'styles');
      }
      const added = styleWithFormat(parts.text(part), part, base, numberFormat);
      parts.set(part, added.text);
      style = added.style;
      known.set(key, style);
    }
    return style;
  };
}

const STYLES_TYPE = 'application/vnd.openxmlformats-officedocument.spreadsheetml.styles+xml';

function addDynamicMark(book: Book, parts: PartEdits): number {
  const { metadataPart, workbookPart, workbook } = book.source;
  if (metadataPart !== undefined) {
    const { text, cm } = withDynamicMark(parts.text(metadataPart), metadataPart);
    parts.set(metadataPart, text);
    return cm;
  }
  addPart(book, parts, parts.freeName(folderOf(workbookPart), 'metadata'), newMetadata(workbook.mainUri), METADATA_TYPE, 'sheetMetadata');
  return 1;
}

function addPart(book: Book, parts: PartEdits, name: string, text: string, contentType: string, relation: string): void {
  const { workbookPart, workbook } = book.source;
  parts.addPart(name, text, contentType, workbookPart, `${relationshipsOf(workbook.mainUri)}/${relation}`);
}

function folderOf(part: string): string {
  return part.slice(0, part.lastIndexOf('/') + 1);
}

function withFullCalculation(text: string, part: string): string {
  const root = parseXml(text, part);
  const calc = childOf(root, 'calcPr');
  if (calc) {
    const tag = withAttributes(text.slice(calc.start, calc.openEnd), { fullCalcOnLoad: '1' });
    return applySplices(text, [{ start: calc.start, end: calc.openEnd, text: tag }]);
  }
  // calcPr comes right after these (ECMA-376 part 1, 18.2.27)
  const before = ['sheets', 'functionGroups', 'externalReferences', 'definedNames'];
  const last = root.children.filter((child) => before.includes(child.tag.local)).at(-1)!;
  return applySplices(text, [{ start: last.end, end: last.end, text: `<${prefixOf(root)}calcPr fullCalcOnLoad="1"/>` }]);
}
