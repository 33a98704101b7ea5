import { strFromU8, strToU8, unzipSync, zipSync } from 'fflate';
import type { Zippable } from 'fflate';

export const MAIN = 'http://schemas.openxmlformats.org/spreadsheetml/2006/main';
export const RELS = 'http://schemas.openxmlformats.org/officeDocument/2006/relationships';
export const STRICT = 'http://purl.oclc.org/ooxml/spreadsheetml/main';
export const STRICT_RELS = 'http://purl.oclc.org/ooxml/officeDocument/relationships';
const PACKAGE_RELS = 'http://schemas.openxmlformats.org/package/2006/relationships';
const TYPE = 'application/vnd.openxmlformats-officedocument.spreadsheetml';

export interface SheetParts {
  name?: string;
  /** Inside `<worksheet>`. */
  xml?: string;
  /** Or the whole part. */
  part?: string | Uint8Array;
  attributes?: string;
  kind?: string;
  tables?: string[];
}

export interface BookParts {
  sheets?: SheetParts[];
  strings?: string;
  styles?: string;
  metadata?: string;
  calcChain?: string;
  /** Inside `<workbook>`, before and after `<sheets>`. */
  before?: string;
  after?: string;
  main?: string;
  rels?: string;
  workbookType?: string;
  extra?: Zippable;
}

/** A small workbook from hand-written parts, in the order a spreadsheet program writes them. */
export function buildBook(book: BookParts = {}): Uint8Array {
  return zipSync(bookFiles(book), { mtime: '2024-01-02T00:00:00' });
}

export function bookFiles({ sheets = [{}], strings, styles, metadata, calcChain, before = '', after = '', main = MAIN, rels = RELS, workbookType, extra = {} }: BookParts): Zippable {
  const overrides: string[] = [`<Override PartName="/xl/workbook.xml" ContentType="${workbookType ?? `${TYPE}.sheet.main+xml`}"/>`];
  const workbookRels: string[] = [];
  const files: Zippable = {};
  const add = (path: string, text: string | Uint8Array, kind: string, id: string): void => {
    files[`xl/${path}`] = typeof text === 'string' ? strToU8(text) : text;
    overrides.push(`<Override PartName="/xl/${path}" ContentType="${TYPE}.${kind}+xml"/>`);
    workbookRels.push(relation(id, `${rels}/${kind}`, path));
  };
  sheets.forEach(({ xml, part, kind = 'worksheet', tables = [] }, i) => {
    const path = `${kind}s/sheet${i + 1}.xml`;
    add(path, part ?? sheetPart(xml ?? '<sheetData/>', main), kind, `rId${i + 1}`);
    tables.forEach((table, j) => {
      const name = `tables/table${i + 1}${j + 1}.xml`;
      files[`xl/${name}`] = strToU8(table);
      overrides.push(`<Override PartName="/xl/${name}" ContentType="${TYPE}.table+xml"/>`);
    });
    if (tables.length > 0) {
      const own = tables.map((_, j) => relation(`rId${j + 1}`, `${rels}/table`, `../tables/table${i + 1}${j + 1}.xml`));
      files[`xl/worksheets/_rels/sheet${i + 1}.xml.rels`] = strToU8(relations(own));
    }
  });
  if (strings !== undefined) add('sharedStrings.xml', strings, 'sharedStrings', 'rIdStrings');
  if (styles !== undefined) add('styles.xml', styles, 'styles', 'rIdStyles');
  if (metadata !== undefined) add('metadata.xml', metadata, 'sheetMetadata', 'rIdMetadata');
  if (calcChain !== undefined) add('calcChain.xml', calcChain, 'calcChain', 'rIdChain');
  const list = sheets.map(({ name, attributes = '' }, i) => `<sheet name="${name ?? `Sheet${i + 1}`}" sheetId="${i + 1}"${attributes} r:id="rId${i + 1}"/>`);
  return {
    '[Content_Types].xml': strToU8('<?xml version="1.0"?><Types xmlns="http://schemas.openxmlformats.org/package/2006/content-types">'
      + `<Default Extension="rels" ContentType="application/vnd.openxmlformats-package.relationships+xml"/><Default Extension="xml" ContentType="application/xml"/>${overrides.join('')}</Types>`),
    '_rels/.rels': strToU8(relations([relation('rId1', `${rels}/officeDocument`, 'xl/workbook.xml')])),
    'xl/workbook.xml': strToU8(`<workbook xmlns="${main}" xmlns:r="${rels}">${before}<sheets>${list.join('')}</sheets>${after}</workbook>`),
    'xl/_rels/workbook.xml.rels': strToU8(relations(workbookRels)),
    ...files,
    ...extra,
  };
}

export function sheetPart(xml: string, main = MAIN): string {
  return `<?xml version="1.0" encoding="UTF-8" standalone="yes"?>\r\n<worksheet xmlns="${main}" xmlns:r="${RELS}">${xml}</worksheet>`;
}

/** The parts of an archive as text. */
export function partsOf(bytes: Uint8Array): Record<string, string> {
  return Object.fromEntries(Object.entries(unzipSync(bytes)).map(([name, data]) => [name, strFromU8(data)]));
}

function relation(id: string, type: string, target: string): string {
  return `<Relationship Id="${id}" Type="${type}" Target="${target}"/>`;
}

function relations(list: string[]): string {
  return `<Relationships xmlns="${PACKAGE_RELS}">${list.join('')}</Relationships>`;
}
