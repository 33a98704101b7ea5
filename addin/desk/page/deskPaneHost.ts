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
export function deskPaneHost(session: Session, grid: GridAccess, save: (name: string, text: string) => void): PaneHost {
  const { working } = session.desk;
  return {
    port: bookPort(working),
    decimalSeparator: '.',
    selection: async () => grid.selection(),
    onSelection: (moved) => grid.onSelection(moved),
    onChange: (changed) => session.onChange(changed),
    show: async (area) => grid.show(area),
    write: (edits) => session.edit(edits.map(({ sheet, row, col, value, formula, spill, numberFormat }) => ({
      sheet: working.sheetIndex(sheet)!, row, col, numberFormat,
      content: formula !== undefined ? { formula, spill } : { value: value! },
      like: formula === undefined ? headingBeside(working, working.sheetIndex(sheet)!, row, col) : undefined,
    }))),
    undo: () => session.undo(),
    get undoable() { return session.undoable; },
    save,
  };
}

/** The nearest text to the left in the row, whose looks a new heading takes. */
function headingBeside(working: Session['desk']['working'], sheet: number, row: number, col: number): { row: number; col: number } | undefined {
  for (let at = col - 1; at >= Math.max(1, col - 12); at--) if (typeof working.stored(sheet, row, at)?.value === 'string') return { row, col: at };
  return undefined;
}
