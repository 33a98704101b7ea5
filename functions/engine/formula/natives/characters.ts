import { type Native, scalarFunction } from '../native';
import { type Text, text } from '../scalar';
import { numberOf } from './argument';
import { refuseUse } from './refuseUse';
import { made } from './texts';
import { wholeOf } from './wholeOf';

/** The characters 128 to 159 of Windows code page 1252; the five that it leaves open stand for themselves. */
const CODE_PAGE = '€\u0081‚ƒ„…†‡ˆ‰Š‹Œ\u008dŽ\u008f\u0090‘’“”•–—˜™š›œ\u009džŸ';

const OPEN = /[\u0081\u008d\u008f\u0090\u009d]/;

/** Characters and their numbers: CHAR, CODE (Windows code page 1252), UNICHAR, UNICODE, CLEAN. Numbers of characters have slope 0. */
export const characters: Native[] = [
  scalarFunction('CHAR', ['number'], (run, [a]) => {
    const from = numberOf(a);
    const n = wholeOf('CHAR', from.v);
    if (n < 1 || n > 255) return run.steps.error('#VALUE!', from);
    const c = n >= 128 && n < 160 ? CODE_PAGE[n - 128] : String.fromCharCode(n);
    if (OPEN.test(c)) refuseUse('CHAR', `${n} is no character`);
    return made(run, c, [from]);
  }),
  scalarFunction('CODE', ['text'], (run, [a]) => {
    const s = textOf(a as Text | undefined);
    if (s.v === '') return run.steps.error('#VALUE!', s);
    const n = s.v.charCodeAt(0);
    const place = CODE_PAGE.indexOf(s.v[0]);
    if (OPEN.test(s.v[0]) || (place < 0 && (n >= 256 || (n >= 128 && n < 160)))) refuseUse('CODE', `"${s.v[0]}" is not in the code page`);
    return run.steps.count(place < 0 ? n : 128 + place, s);
  }),
  scalarFunction('UNICHAR', ['number'], (run, [a]) => {
    const from = numberOf(a);
    const n = wholeOf('UNICHAR', from.v);
    if (n < 1 || n > 0x10ffff) return run.steps.error('#VALUE!', from);
    if (n >= 0xd800 && n <= 0xdfff) return run.steps.error('#N/A', from);
    if ((n & 0xfffe) === 0xfffe || (n >= 0xfdd0 && n <= 0xfdef)) refuseUse('UNICHAR', `${n} is no character`);
    return made(run, String.fromCodePoint(n), [from]);
  }),
  scalarFunction('UNICODE', ['text'], (run, [a]) => {
    const s = textOf(a as Text | undefined);
    if (s.v === '') return run.steps.error('#VALUE!', s);
    const n = s.v.codePointAt(0)!;
    if (n >= 0xd800 && n <= 0xdfff) refuseUse('UNICODE', 'the text begins with half a character');
    return run.steps.count(n, s);
  }),
  scalarFunction('CLEAN', ['text'], (run, [a]) => {
    const s = textOf(a as Text | undefined);
    if (/[\u007f-\u009f]/.test(s.v)) refuseUse('CLEAN', 'the text holds control characters above 126');
    // eslint-disable-next-line no-control-regex
    return made(run, s.v.replace(/[\u0000-\u001f]/g, ''), [s]);
  }),
];

const EMPTY: Text = text('');
const textOf = (s: Text | undefined): Text => s ?? EMPTY;
