/**
 * A number as Excel writes it into text when it joins text (`=A1&""`): up to 15 significant digits, a plain decimal up to
 * 21 characters, else with an exponent of at least two digits (`1.5E-30`).
 *
 * @source common practice; the limit of 21 characters from memory
 */
export function numberText(x: number): string {
  if (x === 0) return '0';
  const [mantissa, power] = Math.abs(x).toExponential(14).split('e');
  const digits = mantissa.replace('.', '').replace(/0+$/, '');
  const exponent = Number(power);
  const sign = x < 0 ? '-' : '';
  let plain: string;
  if (exponent < 0) plain = `0.${'0'.repeat(-exponent - 1)}${digits}`;
  else if (digits.length <= exponent + 1) plain = digits + '0'.repeat(exponent + 1 - digits.length);
  else plain = `${digits.slice(0, exponent + 1)}.${digits.slice(exponent + 1)}`;
  if (plain.length <= 21) return sign + plain;
  const tail = digits.length > 1 ? `.${digits.slice(1)}` : '';
  return `${sign}${digits[0]}${tail}E${exponent < 0 ? '-' : '+'}${String(Math.abs(exponent)).padStart(2, '0')}`;
}

const NUMBER = /^[+-]?(\d+(,\d{3})*(\.\d*)?|\.\d+)(e[+-]?\d+)?$/i;

/**
 * The number that a text stands for, as an operator or VALUE reads it in an en-US workbook: `12.5`, `1,234`, ` 5 %`, `1e3`,
 * `$5`, `(5)`. Undefined where the text is no number. Dates and times are not read.
 */
export function textNumber(raw: string): number | undefined {
  let s = raw.trim();
  let sign = 1;
  const bracketed = /^\((.*)\)$/.exec(s);
  if (bracketed) {
    s = bracketed[1].trim();
    sign = -1;
    if (/^[+-]/.test(s)) return undefined;
  }
  let scale = 1;
  if (s.endsWith('%')) {
    s = s.slice(0, -1).trim();
    scale = 100;
  }
  s = s.replace(/^([+-]?)\s*\$\s*/, '$1').replace(/^([+-])\s+/, '$1');
  if (!NUMBER.test(s)) return undefined;
  const value = Number(s.replace(/,/g, ''));
  return Number.isFinite(value) ? (sign * value) / scale : undefined;
}
