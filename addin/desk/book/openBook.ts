import { Book } from './Book';
import { BookError } from './BookError';
import { readDynamicMarks } from './metadata';
import { Parts } from './parts';
import { readSharedStrings } from './sharedStrings';
import { readSheet } from './readSheet';
import type { SheetContext } from './readSheet';
import { readWorkbook } from './readWorkbook';
import { NO_STYLES, readStyles } from './styles';
import { readTable } from './tables';

/**
 * Opens an .xlsx, .xlsm, .xltx or .xltm workbook, transitional or strict. All of its worksheets are read here: a book that
 * opened can be asked without a further refusal.
 *
 * @throws BookError for another kind of file, a damaged, encrypted or dangerous one.
 */
export function openBook(bytes: Uint8Array): Book {
  const parts = new Parts(bytes);
  const workbookPart = findWorkbook(parts);
  const relations = parts.relations(workbookPart);
  const workbook = readWorkbook(parts.xml(workbookPart).text, workbookPart, relations);
  refuseSharedParts(workbook.sheets);
  const partOf = (kind: string): string | undefined =>
    parts.find(relations.find((relation) => relation.kind === kind && !relation.external)?.target ?? '');
  const read = <T>(part: string | undefined, reader: (text: string, part: string) => T, otherwise: T): T =>
    part === undefined ? otherwise : reader(parts.xml(part).text, part);

  const stylesPart = partOf('styles');
  const metadataPart = partOf('sheetMetadata');
  const styles = read(stylesPart, readStyles, NO_STYLES);
  const context: Omit<SheetContext, 'part'> = {
    styles,
    strings: read(partOf('sharedStrings'), readSharedStrings, []),
    dynamicMarks: read(metadataPart, readDynamicMarks, []),
    date1904: workbook.date1904,
  };
  const data = workbook.sheets.map(({ kind, part }) =>
    kind === 'worksheet' ? readSheet(parts.xml(part).text, { ...context, part }) : undefined);
  const tables = workbook.sheets.flatMap(({ kind, part }, sheet) => kind !== 'worksheet' ? [] : parts.relations(part)
    .filter((relation) => relation.kind === 'table' && !relation.external)
    .map(({ target }) => readTable(parts.xml(target).text, target, sheet)));
  return new Book({
    parts, workbookPart, workbook, data, styles, stylesPart, metadataPart, tables,
    calcChainPart: partOf('calcChain'),
    macros: partOf('vbaProject') !== undefined || /macroEnabled/i.test(parts.contentType(workbookPart)),
  });
}

function findWorkbook(parts: Parts): string {
  const main = parts.relations('').find((relation) => relation.kind === 'officeDocument' && !relation.external);
  const part = main && parts.find(main.target);
  if (part === undefined) throw new BookError('the archive is not an .xlsx workbook: it names no main document');
  const type = parts.contentType(part);
  if (/sheet\.binary/i.test(type) || part.toLowerCase().endsWith('.bin')) {
    throw new BookError('the file is a binary workbook (.xlsb): save it as .xlsx first');
  }
  if (/wordprocessing|presentation/i.test(type)) throw new BookError('the file is not a workbook but another kind of office document');
  return part;
}

/** An edit of one sheet would change the other. */
function refuseSharedParts(sheets: readonly { name: string; part: string }[]): void {
  const owners = new Map<string, string>();
  for (const { name, part } of sheets) {
    const other = owners.get(part.toLowerCase());
    if (other !== undefined) throw new BookError(`sheets ${other} and ${name} are stored in one part, ${part}`);
    owners.set(part.toLowerCase(), name);
  }
}
