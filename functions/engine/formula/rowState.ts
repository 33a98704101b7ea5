/** Whether a row of a sheet shows: hidden by hand, or left out by a filter that is in force. */
export type RowState = 'shown' | 'hidden' | 'filtered';

/** The rows of a sheet that do not show, by their 1-based number. */
export type HiddenRows = ReadonlyMap<number, Exclude<RowState, 'shown'>>;
