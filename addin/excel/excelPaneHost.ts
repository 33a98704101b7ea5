/// <reference types="office-js" />
import { parseAddress } from '../../functions/address';
import type { PortArea } from '../../functions/workbook';
import type { PaneEdit, PaneHost } from '../pane/PaneHost';
import { asBefore, asTyped } from './cellContent';
import type { Content } from './cellContent';
import type { ExcelPort } from './excelPort';
import { inWords } from './run';
import type { Run } from './run';

/** What stood in a cell before the pane wrote into it; the formats are those of all cells whose format it set. */
interface Before {
  readonly sheet: string;
  readonly row: number;
  readonly col: number;
  readonly content: Content;
  readonly numberFormat: unknown[][];
}

/** How long changes are gathered: a recalculation tells of every sheet. */
const GATHER_MS = 100;

/** Excel as the host of the task pane. Every step remembers what stood there, so that it can be taken back as one. */
export function excelPaneHost(port: ExcelPort, decimalSeparator: '.' | ',', given: Run = Excel.run): PaneHost {
  const run = inWords(given);
  const steps: Before[][] = [];

  return {
    port,
    decimalSeparator,
    selection: () => run(async (context) => {
      const range = context.workbook.getSelectedRange();
      range.load('address');
      await context.sync();
      return parseAddress(range.address);
    }).catch(() => undefined), // several areas, or a chart
    onSelection: (moved) => listen(run, (context) => [context.workbook.onSelectionChanged.add(async () => moved())]),
    onChange: (changed) => {
      let waiting: ReturnType<typeof setTimeout> | undefined;
      const tell = async (): Promise<void> => {
        port.changed();
        waiting ??= setTimeout(() => {
          waiting = undefined;
          changed();
        }, GATHER_MS);
      };
      // A custom function that answers late is told of as a calculation alone.
      const stop = listen(run, ({ workbook: { worksheets } }) => [worksheets.onChanged.add(tell), worksheets.onCalculated.add(tell)]);
      return () => {
        clearTimeout(waiting);
        stop();
      };
    },
    show: (area) => run(async (context) => {
      context.workbook.worksheets.getItem(area.sheet).activate();
      rangeOf(context, area).select();
      await context.sync();
    }),
    write: async (edits) => {
      const before = await run((context) => contentsOf(context, edits));
      try {
        await run((context) => writeAll(context, edits));
      } catch (thrown) {
        // Excel stops at the edit that it refuses and keeps those before it. Each is taken back by itself, for the refused cell would stop
        // the others again; the words of the first refusal are what counts.
        for (const one of before) await run((context) => restore(context, [one])).catch(() => undefined);
        throw thrown;
      } finally {
        port.changed();
      }
      steps.push(before);
      return before;
    },
    undo: async () => {
      const step = steps[steps.length - 1];
      if (!step) return false;
      await run((context) => restore(context, step));
      steps.pop(); // only now: a step that could not be taken back can be tried again
      port.changed();
      return true;
    },
    stands: (step) => steps.some((own) => own === step),
  };
}

const rangeOf = (context: Excel.RequestContext, { sheet, row, col, rows, cols }: PortArea): Excel.Range =>
  context.workbook.worksheets.getItem(sheet).getRangeByIndexes(row - 1, col - 1, rows, cols);

const cellOf = (context: Excel.RequestContext, { sheet, row, col }: { sheet: string; row: number; col: number }): Excel.Range =>
  rangeOf(context, { sheet, row, col, rows: 1, cols: 1 });

/** Formats are set over the whole spill, contents in its first cell alone. */
const formatted = (context: Excel.RequestContext, { sheet, row, col, spill, numberFormat }: PaneEdit): Excel.Range =>
  rangeOf(context, { sheet, row, col, rows: 1, cols: 1, ...(numberFormat !== undefined && spill) });

async function contentsOf(context: Excel.RequestContext, edits: readonly PaneEdit[]): Promise<Before[]> {
  const asked = edits.map((edit) => {
    const cell = cellOf(context, edit);
    cell.load('formulas, values, valueTypes, hasSpill');
    const formats = formatted(context, edit);
    formats.load('numberFormat');
    return { edit, cell, formats };
  });
  await context.sync();
  return asked.map(({ edit: { sheet, row, col }, cell, formats: { numberFormat } }) => ({
    sheet, row, col, numberFormat,
    content: { formula: cell.formulas[0][0], value: cell.values[0][0], type: cell.valueTypes[0][0], format: numberFormat[0][0], hasSpill: cell.hasSpill },
  }));
}

async function writeAll(context: Excel.RequestContext, edits: readonly PaneEdit[]): Promise<void> {
  for (const edit of edits) {
    if (edit.numberFormat !== undefined) formatted(context, edit).numberFormat = [[edit.numberFormat]]; // one for all cells
    cellOf(context, edit).formulas = [[edit.formula ?? asTyped(edit.value ?? '')]];
  }
  await context.sync();
}

/** Contents are taken away first, so that no spill of the step stands in the way of what comes back. */
async function restore(context: Excel.RequestContext, step: readonly Before[]): Promise<void> {
  for (const before of step) cellOf(context, before).formulas = [['']];
  for (const before of step) {
    const { sheet, row, col, content, numberFormat } = before;
    rangeOf(context, { sheet, row, col, rows: numberFormat.length, cols: numberFormat[0].length }).numberFormat = numberFormat;
    cellOf(context, before).formulas = [[asBefore(content)]];
  }
  for (const { sheet, row, col, numberFormat } of step) { // a formula that comes back may bring a format of its own
    rangeOf(context, { sheet, row, col, rows: numberFormat.length, cols: numberFormat[0].length }).numberFormat = numberFormat;
  }
  await context.sync();
}

/** Registers handlers; each is taken away again by the context that added it. Where the host has no such event there is nothing to tell. */
function listen(run: Run, add: (context: Excel.RequestContext) => OfficeExtension.EventHandlerResult<never>[]): () => void {
  const added = run(async (context) => {
    const handlers = add(context);
    await context.sync();
    return handlers;
  }).catch(() => []);
  return () => void added.then((handlers) => Promise.all(handlers.map((handler) => run(async () => {
    handler.remove();
    await handler.context.sync();
  })))).catch(() => undefined);
}
