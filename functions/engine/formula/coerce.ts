import { EngineError } from '../EngineError';
import { readDateText } from './natives/dateText';
import { numberText, textNumber } from './numberText';
import { type Bool, type Err, type Num, type Scalar, type Text, NONE, bool, err, num, text } from './scalar';
import type { Steps } from './steps';

const ZERO: Num = { k: 'number', v: 0, d: NONE };
const EMPTY: Text = { k: 'text', v: '', d: NONE, tainted: false };

/**
 * A scalar where an operator or a number argument wants a number: blank 0, TRUE 1, text read as a number, a date or a time, else
 * #VALUE!.
 *
 * @throws EngineError "refused" for text that may be a date in a form that is not read here
 */
export function toNumber(steps: Steps, s: Scalar): Num | Err {
  switch (s.k) {
    case 'number':
    case 'error':
      return s;
    case 'blank':
      return ZERO;
    case 'boolean':
      return num(s.v ? 1 : 0, s.d);
    case 'text': {
      const v = textNumber(s.v) ?? dateNumber(s.v);
      return v === undefined ? err('#VALUE!', s.d) : steps.fromText(v, s);
    }
  }
}

function dateNumber(written: string): number | undefined {
  const read = readDateText(written);
  if (read === 'unknown') throw new EngineError('refused', `takes the text "${written}" for a number, which may be a date in a form that is not read here`);
  return read === 'none' ? undefined : read.day + read.clock;
}

/** A scalar where text is wanted: numbers in General format, TRUE and FALSE in capitals, blank "". */
export function toText(steps: Steps, s: Scalar): Text | Err {
  switch (s.k) {
    case 'text':
    case 'error':
      return s;
    case 'blank':
      return EMPTY;
    case 'number':
      return s.d === NONE ? text(numberText(s.v)) : steps.text(numberText(s.v), s);
    case 'boolean':
      return text(s.v ? 'TRUE' : 'FALSE', s.d);
  }
}

/** A scalar where a condition is wanted: numbers other than 0 are TRUE, the texts TRUE and FALSE are read, other text is #VALUE!. */
export function toBool(steps: Steps, s: Scalar): Bool | Err {
  switch (s.k) {
    case 'boolean':
    case 'error':
      return s;
    case 'blank':
      return bool(false);
    case 'number':
      return s.d === NONE ? bool(s.v !== 0) : steps.decision(s.v !== 0, s);
    case 'text': {
      const word = s.v.toUpperCase();
      return word === 'TRUE' || word === 'FALSE' ? bool(word === 'TRUE', s.d) : err('#VALUE!', s.d);
    }
  }
}
