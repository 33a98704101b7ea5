import { element, textElement, xmlPart } from './xml';

const mainNamespace = 'http://schemas.openxmlformats.org/spreadsheetml/2006/main';

/** A run of a rich text: `sub` sets it below the line. */
export interface TextRun { text: string; sub?: boolean }

export interface SharedStrings {
  /** Place of the text in the table; the text is added when new. */
  indexOf(text: string | readonly TextRun[]): number;
  part(): string;
}

/** The table of texts that all sheets share. */
export function sharedStrings(): SharedStrings {
  const places = new Map<string, number>();
  let uses = 0;
  return {
    indexOf(text) {
      uses += 1;
      const item = typeof text === 'string' ? textElement('t', text) : text.map(runXml).join('');
      const place = places.get(item) ?? places.size;
      places.set(item, place);
      return place;
    },
    part() {
      const items = [...places.keys()].map((item) => element('si', {}, item)).join('');
      return xmlPart(element('sst', { xmlns: mainNamespace, count: uses, uniqueCount: places.size }, items));
    },
  };
}

function runXml(run: TextRun): string {
  const below = run.sub ? element('vertAlign', { val: 'subscript' }) : '';
  const look = element('rPr', {}, below
    + element('sz', { val: 10 }) + element('color', { rgb: 'FF5B6770' }) + element('rFont', { val: 'Calibri' }) + element('family', { val: 2 }));
  // A space at the end of a run counts, so it is always kept.
  return element('r', {}, look + textElement('t', run.text, { 'xml:space': 'preserve' }));
}
