import { each } from '../declaration';
import { pairStyles, pairText } from '../engine/report/pairText';
import { readPair } from '../engine/report/readPair';
import { pairRules, roundPair } from '../engine/report/roundPair';
import { refusal } from '../errors';
import { choice, number, oneNumber, text } from '../parameters';

const family = 'Report and decide';

const value = number({ help: 'Value', leads: true });
const stdu = number({ help: 'Standard uncertainty u', above: 0 });
const digits = oneNumber({ help: 'Significant digits of u, default 2', atLeast: 1, atMost: 15, whole: true, optional: true, fallback: 2 });

export const roundingFunctions = [
  each({
    name: 'UNC_ROUND',
    family,
    help: 'Value and u, u rounded to significant digits and the value to the same decimal place.',
    parameters: {
      value,
      stdu,
      digits,
      rule: choice({
        help: 'even (nearest, ties to even), up (never down), up5 (down only where that loses at most 5 %), pdg (digits by the 354/949 rule)',
        choices: pairRules,
      }),
    },
    result: 'value, u',
    columns: () => 2,
    body: ({ value, stdu, digits, rule }) => {
      const rounded = roundPair(value, stdu, digits, rule);
      return [rounded.value, rounded.u];
    },
  }),
  each({
    name: 'UNC_TEXT',
    family,
    help: 'Value with its uncertainty as text, both rounded to the same place, zeros kept.',
    parameters: {
      value,
      stdu,
      style: choice({ help: 'plusminus 12.10 ± 0.05, brackets 12.10(5), scientific, percent', choices: pairStyles }),
      digits,
      unit: text({ help: 'A label that is appended; blank for none', optional: true }),
      k: number({ help: 'Coverage factor: multiplies u and is stated; not with brackets', above: 0, optional: true }),
    },
    result: 'text',
    body: ({ value, stdu, style, digits, unit, k }, { decimalSeparator }) => pairText(value, stdu, { style, digits, unit, k, decimalSeparator }),
  }),
  each({
    name: 'UNC_READ',
    family,
    help: 'Reads a value with its uncertainty from text: 12.10 ± 0.05, 12.10(5), (12.10 ± 0.12) mg/L, k = 2.',
    parameters: { text: text({ help: 'Value with its uncertainty as written; decimal point or comma' }) },
    result: 'value, ± as written, k, u',
    columns: () => 4,
    body: ({ text }, { decimalSeparator }) => {
      const { value, half, k } = readPair(text, decimalSeparator);
      const u = k === undefined ? refusal('the text states no k, so u cannot be told; divide the ± by its coverage factor') : half / k;
      return [value, half, k ?? '', half === 0 ? 'exact' : u];
    },
  }),
];
