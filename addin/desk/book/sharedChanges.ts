import { cellKey, cellOfKey } from './area';
import type { SheetChanges } from './CellChange';
import { changeAt } from './CellChange';
import { storedCell } from './SheetData';
import type { SheetData } from './SheetData';

/**
 * Where the owner of a shared formula is overwritten, gives the formula to the first of the cells that still follow it. That
 * cell must be the top left corner of what is left; where it is not, every follower gets its own formula.
 */
export function addSharedChanges(sheet: SheetData, changes: SheetChanges, isOverwritten: (key: number) => boolean): void {
  for (const group of sheet.shared) {
    if (!isOverwritten(group.owner)) continue;
    const left = group.followers.filter((key) => !isOverwritten(key)).map(cellOfKey);
    if (left.length === 0) continue;
    const formulaOf = ({ row, col }: { row: number; col: number }): string => storedCell(sheet, row, col)!.formula!;
    const ref = { top: Infinity, left: Infinity, bottom: 0, right: 0 };
    for (const { row, col } of left) {
      ref.top = Math.min(ref.top, row);
      ref.left = Math.min(ref.left, col);
      ref.bottom = Math.max(ref.bottom, row);
      ref.right = Math.max(ref.right, col);
    }
    const first = left.find(({ row, col }) => cellKey(row, col) === cellKey(ref.top, ref.left));
    const unique = sheet.shared.every((other) => other === group || other.si !== group.si);
    // a formula that reads #REF! no longer says what its followers read
    if (first && unique && !formulaOf(first).includes('#REF!')) {
      changeAt(changes, first.row, first.col).shared = { formula: formulaOf(first), owner: { si: group.si, ref } };
    } else for (const cell of left) changeAt(changes, cell.row, cell.col).shared = { formula: formulaOf(cell) };
  }
}
