import { strFromU8, strToU8, unzipSync, zipSync } from 'fflate';
import type { Draws } from '../../../addin/desk/demo/seededDraws';

const whole = (draws: Draws, below: number): number => Math.floor(draws.uniform() * below);

/** Numbers, references and texts that readers stumble over. */
const TROUBLE = [
  '', '0', '-1', '1', '2', '007', '1e999', '-1e308', '1e-320', 'NaN', 'Infinity', '0x10', '1,5', '2147483648', '9999999999', '1048577', '16385', 'A0', 'A1', 'B2', 'XFE1',
  'XFD1048576', 'A1:XFD1048576', 'B2:A1', '$A$1', '#REF!', 's', 'str', 'b', 'e', 'd', 'inlineStr', 'array', 'shared', 'dataTable', 'true', 'rId1', 'rId99', '../../../x', '/etc/passwd',
  'xl/workbook.xml', 'SUM(A1', '=A1', 'A1:A', 'INDIRECT("A1")', '"', '{1,2;3}', '((((((((((1))))))))))', '1'.repeat(400), '_x0000_', '_xD800_', '&#xD83D;&#xDE00;', '&bogus;', '&#0;', ']]>', '<x/>',
];

/** An archive with some of its bytes changed: flipped, overwritten, cut out, doubled, or cut short. */
export function mutateBytes(bytes: Uint8Array, draws: Draws): Uint8Array {
  let out: Uint8Array = Uint8Array.from(bytes);
  for (let n = 1 + whole(draws, 3); n > 0; n--) {
    const at = whole(draws, out.length);
    const length = 1 + whole(draws, draws.uniform() < 0.8 ? 8 : 400);
    switch (whole(draws, 6)) {
      case 0: out[at] ^= 1 << whole(draws, 8); break;
      case 1: out[at] = draws.pick([0, 1, 0x7f, 0x80, 0xff, whole(draws, 256)]); break;
      case 2: out = joined(out.subarray(0, at), out.subarray(at + length)); break;
      case 3: out = joined(out.subarray(0, at), out.subarray(at, at + length), out.subarray(at)); break;
      case 4: out = out.slice(0, Math.max(1, at)); break;
      default: out = joined(out.subarray(0, at), Uint8Array.from({ length }, () => whole(draws, 256)), out.subarray(at));
    }
    if (out.length === 0) return out;
  }
  return out;
}

/** A workbook with the XML of one part changed, packed again so that its checksums are right. */
export function mutateXml(bytes: Uint8Array, draws: Draws): Uint8Array {
  const parts = unzipSync(bytes);
  const name = draws.pick(Object.keys(parts).filter((n) => n.endsWith('.xml') || n.endsWith('.rels')));
  let text = strFromU8(parts[name]);
  for (let n = 1 + whole(draws, 3); n > 0; n--) text = mutatedText(text, draws);
  parts[name] = draws.uniform() < 0.03 ? strToU8(text, true) : strToU8(text);
  if (draws.uniform() < 0.03) delete parts[name];
  return zipSync(parts, { level: 1 });
}

function mutatedText(text: string, draws: Draws): string {
  const pickOf = (pattern: RegExp): RegExpMatchArray | undefined => {
    const all = [...text.matchAll(pattern)];
    return all.length > 0 ? draws.pick(all) : undefined;
  };
  const replaced = (m: RegExpMatchArray | undefined, by: string): string => (m ? text.slice(0, m.index!) + by + text.slice(m.index! + m[0].length) : text);
  switch (whole(draws, 9)) {
    case 0: { // an attribute's value
      const m = pickOf(/="[^"]*"/g);
      return replaced(m, `="${draws.pick(TROUBLE).replace(/"/g, '&quot;')}"`);
    }
    case 1: { // the text of an element
      const m = pickOf(/>[^<]+</g);
      return replaced(m, `>${draws.pick(TROUBLE)}<`);
    }
    case 2: return replaced(pickOf(/<[^>]+\/>/g), ''); // an empty element goes
    case 3: return replaced(pickOf(/<\/?[a-zA-Z:]+[^>]*>/g), ''); // a tag goes
    case 4: { // an element is doubled
      const m = pickOf(/<([a-zA-Z:]+)[^>]*>[^<]*<\/\1>/g);
      return replaced(m, m ? m[0] + m[0] : '');
    }
    case 5: { // an attribute goes
      const m = pickOf(/ [a-zA-Z:]+="[^"]*"/g);
      return replaced(m, '');
    }
    case 6: { // one value takes the place of another
      const [a, b] = [pickOf(/="[^"]*"/g), pickOf(/="[^"]*"/g)];
      return a && b ? replaced(a, b[0]) : text;
    }
    case 7: { // a character
      const at = whole(draws, text.length);
      return text.slice(0, at) + draws.pick(['<', '>', '&', '"', '\u0000', '\uffff', ' ', '0', 'Z', '']) + text.slice(at + whole(draws, 3));
    }
    default: { // a digit
      const m = pickOf(/\d/g);
      return replaced(m, String(whole(draws, 10)));
    }
  }
}

function joined(...pieces: Uint8Array[]): Uint8Array {
  const out = new Uint8Array(pieces.reduce((n, p) => n + p.length, 0));
  let at = 0;
  for (const piece of pieces) {
    out.set(piece, at);
    at += piece.length;
  }
  return out;
}
