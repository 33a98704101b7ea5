import { BookError } from './BookError';
import { isMain, isTrue, relationId } from './namespaces';
import type { Relation } from './parts';
import { attribute, childOf, childrenOf, parseXml } from './xmlTree';
import { decodeXstring } from './xstring';

export type SheetKind = 'worksheet' | 'chartsheet' | 'dialogsheet' | 'macrosheet';

export interface BookName {
  name: string;
  /** Index into `Book.sheets`, for a name that belongs to one sheet. */
  sheet?: number;
  /** A1 text without "=". */
  formula: string;
  hidden?: boolean;
}

export type SheetState = 'visible' | 'hidden' | 'veryHidden';

export interface Workbook {
  mainUri: string;
  sheets: { name: string; part: string; state: SheetState; kind: SheetKind }[];
  names: BookName[];
  date1904: boolean;
  calcMode: 'auto' | 'autoNoTable' | 'manual';
  iterate: boolean;
  fullPrecision: boolean;
}

/** Reads `xl/workbook.xml`: the sheets in the order of their tabs, the names, and how the workbook calculates. */
export function readWorkbook(text: string, part: string, relations: readonly Relation[]): Workbook {
  const root = parseXml(text, part);
  if (root.tag.local !== 'workbook' || !isMain(root.tag.uri)) throw new BookError(`part ${part} is not a workbook`);
  const sheets = childrenOf(childOf(root, 'sheets'), 'sheet').map((sheet) => {
    const name = decodeXstring(attribute(sheet, 'name') ?? '');
    const id = relationId(sheet.tag);
    const relation = relations.find((item) => item.id === id && !item.external);
    if (!relation) throw new BookError(`sheet ${name} has no part in the archive`);
    const word = attribute(sheet, 'state');
    const state: SheetState = word === 'hidden' || word === 'veryHidden' ? word : 'visible';
    return { name, part: relation.target, kind: kindOf(relation.kind), state };
  });
  if (sheets.length === 0) throw new BookError('the workbook has no sheets');
  const names = childrenOf(childOf(root, 'definedNames'), 'definedName').map((element) => {
    const name: BookName = { name: decodeXstring(attribute(element, 'name') ?? ''), formula: decodeXstring(element.text) };
    const sheet = attribute(element, 'localSheetId');
    if (sheet !== undefined) name.sheet = Number(sheet);
    if (isTrue(attribute(element, 'hidden'))) name.hidden = true;
    return name;
  });
  const calc = childOf(root, 'calcPr');
  const mode = calc && attribute(calc, 'calcMode');
  const properties = childOf(root, 'workbookPr');
  return {
    mainUri: root.tag.uri, sheets, names,
    date1904: isTrue(properties && attribute(properties, 'date1904')),
    calcMode: mode === 'manual' || mode === 'autoNoTable' ? mode : 'auto',
    iterate: isTrue(calc && attribute(calc, 'iterate')),
    fullPrecision: isTrue((calc && attribute(calc, 'fullPrecision')) ?? '1'),
  };
}

function kindOf(relation: string): SheetKind {
  if (relation === 'worksheet' || relation === 'chartsheet' || relation === 'dialogsheet') return relation;
  if (/macrosheet$/i.test(relation)) return 'macrosheet';
  throw new BookError(`the workbook has a sheet of unknown kind: ${relation}`);
}
