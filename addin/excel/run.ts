/// <reference types="office-js" />
import { PortRefusal } from '../../functions/workbook';

/** Runs a batch against the workbook: `Excel.run`, or a test's own. */
export type Run = <T>(batch: (context: Excel.RequestContext) => Promise<T>) => Promise<T>;

/** The same, what the host throws put in words that a cell or the pane can show. */
export const inWords = (run: Run): Run => async (batch) => {
  try {
    return await run(batch);
  } catch (thrown) {
    throw isRefusal(thrown) ? new PortRefusal(wordsFor(thrown)) : thrown;
  }
};

/** What Office.js throws: an error with a code from its list. Known by its shape, since its class is the host's. */
interface HostRefusal {
  readonly code: string;
  readonly message?: string;
}

const isRefusal = (thrown: unknown): thrown is HostRefusal =>
  typeof thrown === 'object' && thrown !== null && typeof (thrown as { code?: unknown }).code === 'string';

/** True where the answer, or what was asked, is larger than the host sends at once: 5 MB in Excel on the web. */
export const isTooLarge = (thrown: unknown): boolean => isRefusal(thrown) && /PayloadSizeLimitExceeded$/.test(thrown.code);

function wordsFor(refusal: HostRefusal): string {
  const { code, message } = refusal;
  if (isTooLarge(refusal)) return 'Excel does not send so much at once: refer to smaller ranges';
  if (code === 'ItemNotFound') return 'Excel does not find a sheet any more: it was renamed or deleted meanwhile';
  if (code === 'AccessDenied') return 'Excel does not allow it: the sheet or the workbook is protected';
  if (code === 'InvalidOperationInCellEditMode') return 'Excel is waiting for a cell that is being edited: press Enter or Escape there';
  return `Excel refuses (${code}${message ? `: ${message.replace(/\.$/, '')}` : ''})`;
}
