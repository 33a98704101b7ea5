import type { PortArea, WorkbookPort } from '../../functions/workbook';

/** A cell that the pane writes. Formulas are as a user types them in an en-US workbook: `=ROOTSUM.UNC_CARRY(…)`. */
export interface PaneEdit {
  readonly sheet: string;
  readonly row: number;
  readonly col: number;
  /** A heading or another constant. */
  readonly value?: string | number;
  readonly formula?: string;
  /** The size over which the formula is expected to spill; a formula without it stays in its cell. */
  readonly spill?: { readonly rows: number; readonly cols: number };
  readonly numberFormat?: string;
}

/** What the task pane asks of the program it stands in: Excel, or the desk's page. */
export interface PaneHost {
  readonly port: WorkbookPort;
  readonly decimalSeparator: '.' | ',';
  /** The selected cells, or undefined where nothing that has cells is selected. */
  selection(): Promise<PortArea | undefined>;
  /** Calls back whenever the selection moves, until the returned function is called. */
  onSelection(moved: () => void): () => void;
  /** Calls back whenever cells may have changed, until the returned function is called. */
  onChange(changed: () => void): () => void;
  /** Selects cells and brings them into view. */
  show(area: PortArea): Promise<void>;
  /**
   * Writes cells as one step, which `undo` takes back as one. Whether they are free is the pane's question.
   *
   * @returns what stands for the step.
   * @throws Error with words, and nothing is written, where the host refuses.
   */
  write(edits: readonly PaneEdit[]): Promise<object>;
  /**
   * Takes back the last step that the pane wrote, and no other. False where there is none.
   *
   * @throws Error with words where it cannot be taken back, since the sheet was changed after it, say.
   */
  undo(): Promise<boolean>;
  /** Whether a step that was written has not been taken back. */
  stands(step: object): boolean;
}
