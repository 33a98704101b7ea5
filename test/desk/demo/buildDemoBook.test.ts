import { readFileSync } from 'node:fs';
import { strFromU8, unzipSync } from 'fflate';
import { SaxesParser } from 'saxes';
import { describe, expect, it } from 'vitest';
import { buildDemoBook } from '../../../addin/desk/demo/buildDemoBook';

const bytes = buildDemoBook();
const files = unzipSync(bytes);
const part = (name: string): string => strFromU8(files[name]);
const sheetNames = ['Overview', 'Hardness', 'Chloride', 'Titrant', 'Silver titrant', 'Pipette check', 'Equipment', 'Tables'];

interface Cell { text: string; formula: boolean; styledOnly: boolean }

/** Cells of a sheet by address, read by a parser that shares nothing with the writer. */
function cellsOf(name: string): Map<string, Cell> {
  const cells = new Map<string, Cell>();
  const shared: string[] = [];
  let text = '';
  const strings = new SaxesParser();
  strings.on('opentag', (tag) => { if (tag.name === 'si') text = ''; });
  strings.on('text', (chunk) => { text += chunk; });
  strings.on('closetag', (tag) => { if (tag.name === 'si') shared.push(text); });
  strings.write(part('xl/sharedStrings.xml')).close();
  const parser = new SaxesParser();
  let address = '';
  let type = '';
  let formula = false;
  let value: string | undefined;
  parser.on('opentag', (tag) => {
    if (tag.name === 'c') [address, type, formula, value] = [tag.attributes.r as string, (tag.attributes.t as string) ?? 'n', false, undefined];
    if (tag.name === 'f') formula = true;
    text = '';
  });
  parser.on('text', (chunk) => { text += chunk; });
  parser.on('closetag', (tag) => {
    if (tag.name === 'v') value = text;
    if (tag.name === 'c') {
      cells.set(address, { text: type === 's' ? shared[Number(value)] : value ?? '', formula, styledOnly: value === undefined && !formula });
    }
  });
  parser.write(part(`xl/worksheets/sheet${sheetNames.indexOf(name) + 1}.xml`)).close();
  return cells;
}

const cells = new Map(sheetNames.map((name) => [name, cellsOf(name)]));
const numberAt = (sheet: string, address: string): number => Number(cells.get(sheet)!.get(address)!.text);

describe('the demo workbook', () => {
  it('is the same bytes at every build', () => {
    expect(Buffer.from(buildDemoBook()).equals(Buffer.from(bytes))).toBe(true);
  });

  it('holds each kind of part that a laboratory workbook has', () => {
    expect(Object.keys(files)).toEqual(expect.arrayContaining([
      '[Content_Types].xml', '_rels/.rels', 'docProps/app.xml', 'docProps/core.xml', 'xl/workbook.xml', 'xl/_rels/workbook.xml.rels',
      'xl/styles.xml', 'xl/sharedStrings.xml', 'xl/theme/theme1.xml', 'xl/calcChain.xml', 'xl/comments1.xml', 'xl/drawings/vmlDrawing1.vml',
      'xl/drawings/drawing1.xml', 'xl/charts/chart1.xml', 'xl/charts/chart2.xml', 'xl/tables/table1.xml',
      ...sheetNames.map((_, i) => `xl/worksheets/sheet${i + 1}.xml`),
    ]));
  });

  it('is well-formed XML in every part', () => {
    for (const name of Object.keys(files)) {
      const parser = new SaxesParser({ xmlns: true });
      parser.on('error', (error) => { throw new Error(`${name}: ${error.message}`); });
      parser.write(part(name)).close();
    }
  });

  it('names every part in the content types, and every relation leads to a part', () => {
    const types = part('[Content_Types].xml');
    const names = Object.keys(files).filter((name) => name.endsWith('.xml') && name !== '[Content_Types].xml');
    for (const name of names) expect(types).toContain(`PartName="/${name}"`);
    for (const name of Object.keys(files).filter((each) => each.endsWith('.rels'))) {
      const folder = name.replace(/_rels\/[^/]*$/, '');
      for (const [, target] of part(name).matchAll(/Target="([^"]*)"/g)) {
        expect(Object.keys(files)).toContain(new URL(target, `file:///${folder}`).pathname.slice(1));
      }
    }
  });

  it('has the sheets, in order', () => {
    expect([...part('xl/workbook.xml').matchAll(/<sheet name="([^"]*)"/g)].map((match) => match[1])).toEqual(sheetNames);
  });

  it('has native formulas only, each with a stored value, and each in the calculation chain', () => {
    const counts = sheetNames.map((name) => [...cells.get(name)!.values()].filter((cell) => cell.formula).length);
    // Overview 2 rows of 5; Hardness 64 rows of 5 and 2 above; Chloride 50 rows of 3 and 2 above; each titrant 3 + 8 + 3;
    // the pipette check 4 conditions, 2 columns of 10, 8 results; Equipment 6 degrees of freedom.
    expect(counts).toEqual([10, 322, 152, 14, 14, 32, 6, 0]);
    expect([...part('xl/calcChain.xml').matchAll(/<c /g)]).toHaveLength(counts.reduce((total, count) => total + count, 0));
    for (let i = 1; i <= sheetNames.length; i += 1) {
      const xml = part(`xl/worksheets/sheet${i}.xml`);
      expect(xml).not.toMatch(/ROOTSUM|_xldudf/i);
      expect(xml).not.toMatch(/NaN|Infinity|undefined/);
      expect(xml).not.toMatch(/(<\/f>|<f [^>]*\/>)<\/c>/);
    }
  });

  it('has the names, one of them local to a sheet', () => {
    const workbook = part('xl/workbook.xml');
    for (const [name, target] of [['EDTA_conc', 'Titrant!$C$33'], ['M_CaCO3', 'Titrant!$C$10'], ['Blank_vol', 'Titrant!$D$30']]) {
      expect(workbook).toContain(`<definedName name="${name}">${target}</definedName>`);
    }
    expect(workbook).toContain('<definedName name="Limit" localSheetId="1">Hardness!$D$3</definedName>');
    expect(workbook).toContain('<definedName name="_xlnm.Print_Titles" localSheetId="1">Hardness!$4:$5</definedName>');
  });

  it('stores results that follow from the readings (chain written out again from the typed cells)', () => {
    const t = (address: string): number => numberAt('Titrant', address);
    const mean = (first: number, last: number): number => {
      let total = 0;
      for (let row = first; row <= last; row += 1) total += t(`C${row}`) - t(`B${row}`);
      return total / (last - first + 1);
    };
    const blank = mean(27, 29);
    const standard = (((t('C6') - t('C7')) * t('C9')) / t('C10') / t('C11')) * 1e6;
    const edta = (standard * t('C13')) / (mean(17, 21) - blank);
    for (const row of [6, 30, 65]) {
      const h = (address: string): number => numberAt('Hardness', `${address}${row}`);
      // The order of the operations differs from that of the sheet, so a few units in the last place are allowed.
      expect(Math.abs(h('I') / (((h('F') - h('E') - blank) * edta * t('C10')) / h('D')) - 1)).toBeLessThan(1e-14);
    }
  });

  it('leaves the last rows of both templates empty, with formulas that give ""', () => {
    for (const row of [66, 67, 68, 69]) {
      expect(cells.get('Hardness')!.get(`F${row}`)!.styledOnly).toBe(true);
      for (const column of 'GHIJK') expect(cells.get('Hardness')!.get(`${column}${row}`)).toEqual({ text: '', formula: true, styledOnly: false });
    }
    for (const row of [54, 55]) expect(cells.get('Chloride')!.get(`H${row}`)).toEqual({ text: '', formula: true, styledOnly: false });
  });

  it('reads burettes in their own steps: 0.02 mL and 0.05 mL', () => {
    for (const [sheet, step, last] of [['Hardness', 2, 65], ['Chloride', 5, 53]] as const) {
      for (let row = 6; row <= last; row += 1) {
        for (const column of 'EF') {
          const reading = cells.get(sheet)!.get(`${column}${row}`)!.text;
          expect(reading).toMatch(/^\d+(\.\d{1,2})?$/);
          expect(Math.round(Number(reading) * 100) % step).toBe(0);
        }
      }
    }
  });
});

interface PlanColumn {
  sheet: string; anchor: string; header: string | string[]; formula: string; mode: string; rows: string; numberFormat: string | string[];
}

const plan = JSON.parse(readFileSync(new URL('../../../addin/desk/demo/demoPlan.json', import.meta.url), 'utf8')) as { columns: PlanColumn[] };

describe('the plan of the demo workbook', () => {
  /** First and last row of the target; "while" runs over the filled rows of the hardness sheet. */
  const rowsOf = (column: PlanColumn): [number, number] => (column.rows.startsWith('while') ? [6, 65] : column.rows.split(':').map(Number) as [number, number]);
  const widthOf = (column: PlanColumn): number => (Array.isArray(column.header) ? column.header.length : 1);
  const letter = (place: number): string => (place > 26 ? String.fromCharCode(64 + Math.floor((place - 1) / 26)) : '') + String.fromCharCode(65 + ((place - 1) % 26));
  const place = (letters: string): number => [...letters].reduce((total, each) => total * 26 + each.charCodeAt(0) - 64, 0);

  /** Every cell that a column takes, its heading included. */
  function taken(column: PlanColumn): string[] {
    const [, letters, head] = /^([A-Z]+)(\d+)$/.exec(column.anchor)!;
    const [first, last] = rowsOf(column);
    const addresses: string[] = [];
    for (let across = 0; across < widthOf(column); across += 1) {
      const name = letter(place(letters) + across);
      addresses.push(`${column.sheet}!${name}${head}`);
      for (let row = first; row <= last; row += 1) addresses.push(`${column.sheet}!${name}${row}`);
    }
    return addresses;
  }

  it('takes only cells that are free in the book, and none twice', () => {
    const seen = new Set<string>();
    for (const column of plan.columns) {
      for (const address of taken(column)) {
        const [sheet, cell] = address.split('!');
        expect(cells.get(sheet)!.has(cell), `${address} is occupied`).toBe(false);
        expect(seen.has(address), `${address} is taken twice`).toBe(false);
        seen.add(address);
      }
    }
  });

  it('refers only to cells that the book or the plan fills', () => {
    const planned = new Set(plan.columns.flatMap(taken));
    for (const column of plan.columns) {
      const references = column.formula.matchAll(/(?:('[^']+'|[A-Za-z]+)!)?(\$?[A-Z]{1,2}\$?\d+)(?::(\$?[A-Z]{1,2}\$?\d+))?(?![A-Za-z_(.\d])/g);
      for (const [, sheetText, from, to] of references) {
        const sheet = sheetText?.replace(/'/g, '') ?? column.sheet;
        for (const corner of [from, to ?? from]) {
          const address = corner.replace(/\$/g, '');
          expect(cells.get(sheet)!.has(address) || planned.has(`${sheet}!${address}`), `${sheet}!${address} in ${column.anchor}`).toBe(true);
        }
      }
    }
  });

  it('gives evidence in pairs: an input, then its row', () => {
    const carried = plan.columns.filter((column) => /UNC_(CARRY|REPORT|BUDGET)\(/.test(column.formula));
    expect(carried).toHaveLength(7);
    for (const column of carried) {
      const inner = column.formula.slice(column.formula.indexOf('(') + 1, -1).split(',').map((text) => text.trim());
      const pairs = inner.slice(column.formula.includes('UNC_CARRY') ? 1 : 2);
      expect(pairs.length % 2).toBe(0);
      pairs.forEach((text, i) => {
        if (i % 2 === 1) expect(text).toMatch(/^(Equipment!K\d+:[NO]\d+|('Silver titrant'!|Titrant!)?G\d+:[IK]\d+)$/);
      });
    }
  });
});
