import type { PortArea } from '../../../functions/workbook';
import type { PaneHost } from '../../pane/PaneHost';
import { bookPort } from '../sheet/bookPort';
import type { Session } from '../sheet/Session';

/** What the page tells the pane of its grid. */
export interface GridAccess {
  selection(): PortArea | undefined;
  onSelection(moved: () => void): () => void;
  show(area: PortArea): void;
}

/** The desk's page as the host of the task pane. */
export function deskPaneHost(session: Session, grid: GridAccess): PaneHost {
  const { working } = session.desk;
  let own: object[] = [];
  return {
    port: bookPort(working),
    decimalSeparator: '.',
    selection: async () => grid.selection(),
    onSelection: (moved) => grid.onSelection(moved),
    onChange: (changed) => session.onChange(changed),
    show: async (area) => grid.show(area),
    write: async (edits) => {
      await session.edit(edits.map(({ sheet, row, col, value, formula, spill, numberFormat }) => ({
        sheet: working.sheetIndex(sheet)!, row, col, numberFormat,
        content: formula !== undefined ? { formula, spill } : { value: value! },
        like: formula === undefined ? headingBeside(working, working.sheetIndex(sheet)!, row, col) : undefined,
      })));
      const step = session.lastStep!;
      own.push(step);
      return step;
    },
    undo: async () => {
      own = own.filter((step) => session.stands(step));
      const step = own.at(-1);
      if (!step) return false;
      if (step !== session.lastStep) throw new Error('the sheet was changed since: take those changes back first, by the Undo above the sheet');
      return session.undo();
    },
    stands: (step) => session.stands(step),
  };
}

/** The nearest text to the left in the row, whose looks a new heading takes. */
function headingBeside(working: Session['desk']['working'], sheet: number, row: number, col: number): { row: number; col: number } | undefined {
  for (let at = col - 1; at >= Math.max(1, col - 12); at--) if (typeof working.stored(sheet, row, at)?.value === 'string') return { row, col: at };
  return undefined;
}
