import { NONE, type Num, type Scalar } from '../scalar';

/** A coerced number argument; 0 where nothing stands between the commas, as the sheet takes it. */
export const numberOf = (argument: Scalar | undefined): Num =>
  argument?.k === 'number' ? argument : { k: 'number', v: 0, d: NONE };
