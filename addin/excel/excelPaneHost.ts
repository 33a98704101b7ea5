/// <reference types="office-js" />
import { parseAddress } from '../../functions/address';
import type { PortArea } from '../../functions/workbook';
import type { PaneHost } from '../pane/PaneHost';
import type { ExcelPort, Run } from './excelPort';

/** What stood in a cell before the pane wrote into it. */
interface Before {
  readonly sheet: string;
  readonly row: number;
  readonly col: number;
  readonly formulas: unknown[][];
  readonly numberFormat: unknown[][];
}

/** Excel as the host of the task pane. Every step remembers what stood there, so that it can be taken back as one. */
export function excelPaneHost(port: ExcelPort, decimalSeparator: '.' | ',', run: Run = Excel.run): PaneHost {
  const steps: Before[][] = [];
  const rangeOf = (context: Excel.RequestContext, { sheet, row, col, rows, cols }: PortArea): Excel.Range =>
    context.workbook.worksheets.getItem(sheet).getRangeByIndexes(row - 1, col - 1, rows, cols);

  return {
    port,
    decimalSeparator,
    selection: () => run(async (context) => {
      const range = context.workbook.getSelectedRange();
      range.load('address');
      await context.sync();
      return parseAddress(range.address);
    }).catch(() => undefined), // several areas, or a chart
    onSelection: (moved) => listen(run, (context) => context.workbook.onSelectionChanged.add(async () => moved())),
    onChange: (changed) => listen(run, (context) => context.workbook.worksheets.onChanged.add(async () => {
      port.changed();
      changed();
    })),
    show: (area) => run(async (context) => {
      context.workbook.worksheets.getItem(area.sheet).activate();
      rangeOf(context, area).select();
      await context.sync();
    }),
    write: (edits) => run(async (context) => {
      const ranges = edits.map((edit) => {
        const range = rangeOf(context, { ...edit, rows: 1, cols: 1 });
        range.load('formulas');
        // formats are set over the whole spill, contents in its first cell alone
        const whole = rangeOf(context, { ...edit, rows: edit.spill?.rows ?? 1, cols: edit.numberFormat === undefined ? 1 : (edit.spill?.cols ?? 1) });
        whole.load('numberFormat');
        return { edit, range, whole };
      });
      await context.sync();
      const before = ranges.map(({ edit, range, whole }): Before => ({ sheet: edit.sheet, row: edit.row, col: edit.col, formulas: range.formulas, numberFormat: whole.numberFormat }));
      for (const { edit, range, whole } of ranges) {
        range.formulas = [[edit.formula ?? edit.value ?? '']];
        if (edit.numberFormat !== undefined) whole.numberFormat = [[edit.numberFormat]];
      }
      await context.sync();
      steps.push(before);
      port.changed();
    }),
    undo: async () => {
      const step = steps.pop();
      if (!step) return false;
      await run(async (context) => {
        for (const { sheet, row, col, formulas, numberFormat } of step) {
          rangeOf(context, { sheet, row, col, rows: 1, cols: 1 }).formulas = formulas;
          rangeOf(context, { sheet, row, col, rows: numberFormat.length, cols: numberFormat[0].length }).numberFormat = numberFormat;
        }
        await context.sync();
      });
      port.changed();
      return true;
    },
    get undoable() { return steps.length; },
    save: (name, text) => {
      const address = URL.createObjectURL(new Blob([text]));
      const link = document.createElement('a');
      link.href = address;
      link.download = name;
      link.click();
      setTimeout(() => URL.revokeObjectURL(address), 10_000);
    },
  };
}

/** Registers a handler; it is taken away again by the context that added it. */
function listen(run: Run, add: (context: Excel.RequestContext) => OfficeExtension.EventHandlerResult<unknown>): () => void {
  const added = run(async (context) => {
    const handler = add(context);
    await context.sync();
    return handler;
  });
  return () => void added.then((handler) => run(async () => {
    handler.remove();
    await handler.context.sync();
  }));
}
