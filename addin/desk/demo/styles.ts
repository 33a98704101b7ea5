import { element, xmlPart } from './xml';

const mainNamespace = 'http://schemas.openxmlformats.org/spreadsheetml/2006/main';

const fonts = {
  plain: { size: 11, color: 'FF1F2A30' },
  title: { size: 16, color: 'FF17404F', bold: true },
  soft: { size: 10, color: 'FF5B6770' },
  bold: { size: 11, color: 'FF1F2A30', bold: true },
  white: { size: 11, color: 'FFFFFFFF', bold: true },
  entry: { size: 11, color: 'FF1B4F8F' },
} as const;

const fills = { none: '', head: 'FF17404F', section: 'FFD7E6EA', entry: 'FFFFFBEA', result: 'FFEFF5EC' } as const;

const borders = { none: '', grid: 'FFC9D3D7' } as const;

const numberFormats = {
  general: 0, whole: 1, two: 2, date: 164, three: 165, four: 166, five: 167, percent3: 168, one: 169,
} as const;

const customFormats: readonly [number, string][] = [
  [164, 'yyyy\\-mm\\-dd'], [165, '0.000'], [166, '0.0000'], [167, '0.00000'], [168, '0.000%'], [169, '0.0'],
];

interface Look {
  font?: keyof typeof fonts;
  fill?: keyof typeof fills;
  border?: keyof typeof borders;
  format?: keyof typeof numberFormats;
  align?: 'left' | 'center' | 'right';
  wrap?: boolean;
}

/** Looks of cells by name, in the order of the style table. The first is the default of every cell without a style. */
const looks = {
  plain: {},
  title: { font: 'title' },
  note: { font: 'soft' },
  label: { border: 'grid' },
  labelBold: { font: 'bold', border: 'grid', fill: 'result' },
  center: { border: 'grid', align: 'center' },
  section: { font: 'bold', fill: 'section', border: 'grid' },
  group: { font: 'bold', fill: 'section', border: 'grid', align: 'center' },
  head: { font: 'white', fill: 'head', border: 'grid', align: 'center', wrap: true },
  date: { font: 'entry', fill: 'entry', border: 'grid', format: 'date', align: 'center' },
  entryText: { font: 'entry', fill: 'entry', border: 'grid' },
  entry: { font: 'entry', fill: 'entry', border: 'grid' },
  entry1: { font: 'entry', fill: 'entry', border: 'grid', format: 'one' },
  entry2: { font: 'entry', fill: 'entry', border: 'grid', format: 'two' },
  entry3: { font: 'entry', fill: 'entry', border: 'grid', format: 'three' },
  entry4: { font: 'entry', fill: 'entry', border: 'grid', format: 'four' },
  entry5: { font: 'entry', fill: 'entry', border: 'grid', format: 'five' },
  entryPercent: { font: 'entry', fill: 'entry', border: 'grid', format: 'percent3' },
  whole: { border: 'grid', format: 'whole' },
  one: { border: 'grid', format: 'one' },
  two: { border: 'grid', format: 'two' },
  three: { border: 'grid', format: 'three' },
  four: { border: 'grid', format: 'four' },
  five: { border: 'grid', format: 'five' },
  result2: { font: 'bold', fill: 'result', border: 'grid', format: 'two' },
  result3: { font: 'bold', fill: 'result', border: 'grid', format: 'three' },
  result4: { font: 'bold', fill: 'result', border: 'grid', format: 'four' },
  resultText: { font: 'bold', fill: 'result', border: 'grid', align: 'right' },
} as const satisfies Record<string, Look>;

export type StyleName = keyof typeof looks;

/** Place of a named look in the style table. */
export function styleIndex(name: StyleName): number {
  return Object.keys(looks).indexOf(name);
}

/** Differential formats, by place: 0 a high result, 1 a row of the table that is above its limit. */
export const highResultFormat = 0;
export const warningFormat = 1;

/** The part xl/styles.xml. */
export function stylesPart(): string {
  const entries = Object.values(looks) as Look[];
  return xmlPart(element('styleSheet', { xmlns: mainNamespace }, [
    list('numFmts', customFormats.map(([numFmtId, formatCode]) => element('numFmt', { numFmtId, formatCode }))),
    list('fonts', Object.values(fonts).map(fontXml)),
    // Places 0 and 1 are fixed by the format: none, and the 12.5 % grey.
    list('fills', ['none', 'gray125'].map((patternType) => element('fill', {}, element('patternFill', { patternType })))
      .concat(Object.values(fills).slice(1).map(fillXml))),
    list('borders', Object.values(borders).map(borderXml)),
    list('cellStyleXfs', [element('xf', { numFmtId: 0, fontId: 0, fillId: 0, borderId: 0 })]),
    list('cellXfs', entries.map(lookXml)),
    list('cellStyles', [element('cellStyle', { name: 'Normal', xfId: 0, builtinId: 0 })]),
    list('dxfs', [differential('FF9C2A10', 'FFFBE3DC'), differential('FF8A5A00', 'FFFFF1D0')]),
    element('tableStyles', { count: 0, defaultTableStyle: 'TableStyleMedium2', defaultPivotStyle: 'PivotStyleLight16' }),
  ].join('')));
}

function list(name: string, items: readonly string[]): string {
  return element(name, { count: items.length }, items.join(''));
}

function fontXml(font: { size: number; color: string; bold?: boolean }): string {
  return element('font', {}, (font.bold ? element('b') : '')
    + element('sz', { val: font.size }) + element('color', { rgb: font.color })
    + element('name', { val: 'Calibri' }) + element('family', { val: 2 }));
}

function fillXml(color: string): string {
  return element('fill', {}, element('patternFill', { patternType: 'solid' },
    element('fgColor', { rgb: color }) + element('bgColor', { indexed: 64 })));
}

function borderXml(color: string): string {
  const side = (name: string): string => (color === '' ? element(name) : element(name, { style: 'thin' }, element('color', { rgb: color })));
  return element('border', {}, ['left', 'right', 'top', 'bottom'].map(side).join('') + element('diagonal'));
}

function lookXml(look: Look): string {
  const fillPlace = Object.keys(fills).indexOf(look.fill ?? 'none');
  const alignment = look.align !== undefined || look.wrap
    ? element('alignment', { horizontal: look.align, vertical: 'center', wrapText: look.wrap ? 1 : undefined }) : '';
  return element('xf', {
    numFmtId: numberFormats[look.format ?? 'general'],
    fontId: Object.keys(fonts).indexOf(look.font ?? 'plain'),
    fillId: fillPlace === 0 ? 0 : fillPlace + 1,
    borderId: Object.keys(borders).indexOf(look.border ?? 'none'),
    xfId: 0,
    applyNumberFormat: look.format ? 1 : undefined,
    applyFont: look.font ? 1 : undefined,
    applyFill: look.fill ? 1 : undefined,
    applyBorder: look.border ? 1 : undefined,
    applyAlignment: alignment === '' ? undefined : 1,
  }, alignment);
}

function differential(color: string, background: string): string {
  return element('dxf', {}, element('font', {}, element('b') + element('color', { rgb: color }))
    + element('fill', {}, element('patternFill', { patternType: 'solid' },
      element('fgColor', { rgb: background }) + element('bgColor', { rgb: background }))));
}
