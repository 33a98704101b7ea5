import { element, textElement, xmlPart } from './xml';

const officeRelations = 'http://schemas.openxmlformats.org/officeDocument/2006/relationships';
const packageRelations = 'http://schemas.openxmlformats.org/package/2006/relationships';

export interface Relation { id: string; type: string; target: string }

/** A relationships part. Types are the last words of the office relationship addresses, or a whole address. */
export function relationsPart(relations: readonly Relation[]): string {
  return xmlPart(element('Relationships', { xmlns: packageRelations }, relations.map(({ id, type, target }) => element('Relationship', {
    Id: id, Type: type.includes(':') ? type : `${officeRelations}/${type}`, Target: target,
  })).join('')));
}

const spreadsheet = 'application/vnd.openxmlformats-officedocument.spreadsheetml';

const contentTypes: readonly [RegExp, string][] = [
  [/^xl\/workbook\.xml$/, `${spreadsheet}.sheet.main+xml`],
  [/^xl\/worksheets\/sheet\d+\.xml$/, `${spreadsheet}.worksheet+xml`],
  [/^xl\/styles\.xml$/, `${spreadsheet}.styles+xml`],
  [/^xl\/sharedStrings\.xml$/, `${spreadsheet}.sharedStrings+xml`],
  [/^xl\/calcChain\.xml$/, `${spreadsheet}.calcChain+xml`],
  [/^xl\/comments\d+\.xml$/, `${spreadsheet}.comments+xml`],
  [/^xl\/tables\/table\d+\.xml$/, `${spreadsheet}.table+xml`],
  [/^xl\/theme\//, 'application/vnd.openxmlformats-officedocument.theme+xml'],
  [/^xl\/drawings\/drawing\d+\.xml$/, 'application/vnd.openxmlformats-officedocument.drawing+xml'],
  [/^xl\/charts\/chart\d+\.xml$/, 'application/vnd.openxmlformats-officedocument.drawingml.chart+xml'],
  [/^docProps\/core\.xml$/, 'application/vnd.openxmlformats-package.core-properties+xml'],
  [/^docProps\/app\.xml$/, 'application/vnd.openxmlformats-officedocument.extended-properties+xml'],
];

/** The list of content types of the parts with these names. */
export function contentTypesPart(names: readonly string[]): string {
  const overrides = names.flatMap((name) => {
    const entry = contentTypes.find(([pattern]) => pattern.test(name));
    return entry === undefined ? [] : [element('Override', { PartName: `/${name}`, ContentType: entry[1] })];
  });
  return xmlPart(element('Types', { xmlns: 'http://schemas.openxmlformats.org/package/2006/content-types' }, [
    element('Default', { Extension: 'rels', ContentType: 'application/vnd.openxmlformats-package.relationships+xml' }),
    element('Default', { Extension: 'xml', ContentType: 'application/xml' }),
    element('Default', { Extension: 'vml', ContentType: 'application/vnd.openxmlformats-officedocument.vmlDrawing' }),
    ...overrides,
  ].join('')));
}

/** A name of the workbook, or of one sheet where `sheet` (its zero-based place) is given. */
export interface DefinedName { name: string; refersTo: string; sheet?: number }

export function workbookPart(sheets: readonly string[], names: readonly DefinedName[]): string {
  return xmlPart(element('workbook', {
    xmlns: 'http://schemas.openxmlformats.org/spreadsheetml/2006/main', 'xmlns:r': officeRelations,
  }, [
    element('workbookPr', { defaultThemeVersion: 124226 }),
    element('bookViews', {}, element('workbookView', { xWindow: 0, yWindow: 0, windowWidth: 28800, windowHeight: 15000 })),
    element('sheets', {}, sheets.map((name, i) => element('sheet', { name, sheetId: i + 1, 'r:id': `rId${i + 1}` })).join('')),
    element('definedNames', {}, [...names].sort(byName).map((entry) => textElement('definedName', entry.refersTo, {
      name: entry.name, localSheetId: entry.sheet,
    })).join('')),
    element('calcPr', { calcId: 191029 }),
  ].join('')));
}

function byName(a: DefinedName, b: DefinedName): number {
  const [left, right] = [a.name.toLowerCase(), b.name.toLowerCase()];
  return left < right ? -1 : left > right ? 1 : (a.sheet ?? -1) - (b.sheet ?? -1);
}

/** The order in which formulas were last calculated; the worksheet mends it when it is not the best. */
export function calcChainPart(formulas: readonly (readonly string[])[]): string {
  return xmlPart(element('calcChain', { xmlns: 'http://schemas.openxmlformats.org/spreadsheetml/2006/main' },
    formulas.flatMap((addresses, sheet) => addresses.map((r) => element('c', { r, i: sheet + 1 }))).join('')));
}

export function corePropertiesPart(): string {
  const time = (name: string): string => element(`dcterms:${name}`, { 'xsi:type': 'dcterms:W3CDTF' }, '2025-03-31T12:00:00Z');
  return xmlPart(element('cp:coreProperties', {
    'xmlns:cp': 'http://schemas.openxmlformats.org/package/2006/metadata/core-properties',
    'xmlns:dc': 'http://purl.org/dc/elements/1.1/',
    'xmlns:dcterms': 'http://purl.org/dc/terms/',
    'xmlns:xsi': 'http://www.w3.org/2001/XMLSchema-instance',
  }, textElement('dc:title', 'Drinking water: hardness and chloride') + textElement('dc:creator', 'Demonstration laboratory')
    + textElement('cp:lastModifiedBy', 'Demonstration laboratory') + time('created') + time('modified')));
}

export function appPropertiesPart(sheets: readonly string[]): string {
  return xmlPart(element('Properties', {
    xmlns: 'http://schemas.openxmlformats.org/officeDocument/2006/extended-properties',
    'xmlns:vt': 'http://schemas.openxmlformats.org/officeDocument/2006/docPropsVTypes',
  }, textElement('Application', 'Microsoft Excel')
    + element('HeadingPairs', {}, element('vt:vector', { size: 2, baseType: 'variant' },
      element('vt:variant', {}, textElement('vt:lpstr', 'Worksheets')) + element('vt:variant', {}, element('vt:i4', {}, String(sheets.length)))))
    + element('TitlesOfParts', {}, element('vt:vector', { size: sheets.length, baseType: 'lpstr' },
      sheets.map((name) => textElement('vt:lpstr', name)).join('')))
    + textElement('AppVersion', '16.0300')));
}

/** A plain theme: colours and fonts, with the smallest format scheme that the format allows. */
export function themePart(): string {
  const colors = {
    dk2: '17404F', lt2: 'D7E6EA', accent1: '2B6C85', accent2: 'B5542B', accent3: '2F6F5E', accent4: '8A6D3B', accent5: '6B5B95', accent6: '5B8A99', hlink: '1B4F8F', folHlink: '6B5B95',
  };
  const solid = element('a:solidFill', {}, element('a:schemeClr', { val: 'phClr' }));
  const font = (name: string): string => element(`a:${name}`, {},
    element('a:latin', { typeface: 'Calibri' }) + '<a:ea typeface=""/><a:cs typeface=""/>');
  const line = (width: number): string => element('a:ln', { w: width }, solid);
  const effect = element('a:effectStyle', {}, element('a:effectLst'));
  return xmlPart(element('a:theme', { 'xmlns:a': 'http://schemas.openxmlformats.org/drawingml/2006/main', name: 'Laboratory' }, element('a:themeElements', {}, [
    element('a:clrScheme', { name: 'Laboratory' }, [
      element('a:dk1', {}, element('a:sysClr', { val: 'windowText', lastClr: '000000' })),
      element('a:lt1', {}, element('a:sysClr', { val: 'window', lastClr: 'FFFFFF' })),
      ...Object.entries(colors).map(([name, val]) => element(`a:${name}`, {}, element('a:srgbClr', { val }))),
    ].join('')),
    element('a:fontScheme', { name: 'Laboratory' }, font('majorFont') + font('minorFont')),
    element('a:fmtScheme', { name: 'Laboratory' }, [
      element('a:fillStyleLst', {}, solid.repeat(3)),
      element('a:lnStyleLst', {}, line(6350) + line(12700) + line(19050)),
      element('a:effectStyleLst', {}, effect.repeat(3)),
      element('a:bgFillStyleLst', {}, solid.repeat(3)),
    ].join('')),
  ].join(''))));
}

