import { cellName } from '../graph/address';
import type { CellPlace } from '../graph/cellGraph';
import type { WorkbookView } from '../graph/workbookView';

/**
 * Whether a constant stands where a formula must have been: the cells above and below it hold the same formula in relative form.
 *
 * @returns the rest of a sentence that begins with the cell, else undefined
 */
export function typedOver(view: WorkbookView, { sheet, row, col }: CellPlace): string | undefined {
  if (row < 2) return undefined;
  const above = view.cell(sheet, row - 1, col)?.formula;
  if (above === undefined || view.cell(sheet, row + 1, col)?.formula !== above) return undefined;
  return `holds a typed number, but ${cellName(row - 1, col)} and ${cellName(row + 1, col)} hold one formula: its uncertainty would be lost`;
}
