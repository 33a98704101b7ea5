import { h } from './dom';

let count = 0;

/** A field with its label. */
export function field<E extends HTMLElement>(label: string, input: E, help?: string): HTMLElement {
  const id = (input.id ||= `field-${++count}`);
  const note = help === undefined ? undefined : h('small', { id: `${id}-help` }, help);
  if (note) input.setAttribute('aria-describedby', note.id);
  return h('div', { class: 'field' }, h('label', { for: id }, label), input, note);
}

/** A list to choose from; the first is chosen. */
export const choices = (options: readonly (readonly [value: string, text: string])[], change?: () => void): HTMLSelectElement =>
  h('select', { onchange: change }, ...options.map(([value, text]) => h('option', { value }, text)));

export const textField = (value = '', change?: () => void): HTMLInputElement => h('input', { type: 'text', value, autocomplete: 'off', spellcheck: 'false', onchange: change });

export const button = (text: string, press: () => void, primary = false): HTMLButtonElement => h('button', { type: 'button', onclick: press, class: primary ? 'primary' : undefined }, text);

/** A table with headings and rows of texts; numbers stand right. */
export function table(caption: string, headings: readonly string[], rows: readonly (readonly (string | Node)[])[]): HTMLElement {
  return h('div', { class: 'table', tabindex: 0, role: 'region', 'aria-label': caption }, h('table', {},
    h('thead', {}, h('tr', {}, ...headings.map((t) => h('th', { scope: 'col' }, t)))),
    h('tbody', {}, ...rows.map((row) => h('tr', {}, ...row.map((cell) => h('td', { class: typeof cell === 'string' && /^[-+]?[\d.]+(e[-+]?\d+)?$/i.test(cell) ? 'number' : undefined }, cell)))))));
}

/** A number with so many significant digits, for reading. */
export const figures = (value: unknown, digits = 4): string => (typeof value === 'number' ? String(Number(value.toPrecision(digits))) : String(value ?? ''));

/** The number format that shows at least three significant digits of the least of some uncertainties. */
export function formatOf(values: readonly unknown[]): string | undefined {
  const sizes = values.filter((v): v is number => typeof v === 'number' && v > 0);
  if (sizes.length === 0) return undefined;
  const places = Math.min(12, Math.max(0, 2 - Math.floor(Math.log10(Math.min(...sizes)))));
  return places === 0 ? '0' : `0.${'0'.repeat(places)}`;
}

/** The number in a field, with a point or a comma; undefined where it is blank, the text itself where it is none: the function says so. */
export function numberIn({ value }: HTMLInputElement): number | string | undefined {
  const text = value.trim();
  const number = Number(text.replace(',', '.'));
  return text === '' ? undefined : Number.isFinite(number) ? number : text;
}

/** An argument as it is typed into a formula. */
export const typedArgument = (value: number | string | undefined): string => (typeof value === 'string' ? `"${value.replaceAll('"', '""')}"` : String(value ?? ''));
