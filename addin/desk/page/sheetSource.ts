import type { Session } from '../sheet/Session';
import { cellText } from './cellText';
import type { GridSource } from './Grid';

/** A worksheet of a session as the grid shows it. */
export function sheetSource(session: Session, sheet: number): GridSource {
  const { working } = session.desk;
  const { book } = working;
  const formatOf = (row: number, col: number): string =>
    working.styles.get(working.keyOf(sheet, row, col))?.numberFormat ?? book.numberFormat(book.styleAt(sheet, row, col));
  return {
    ...working.used(sheet),
    text: (row, col) => {
      const cell = working.cell(sheet, row, col);
      return cell ? cellText(cell.value, formatOf(row, col)) : '';
    },
    message: (row, col) => session.messageOf(sheet, row, col),
    isNumber: (row, col) => typeof working.cell(sheet, row, col)?.value === 'number',
    isBold: (row, col) => {
      const style = working.styles.get(working.keyOf(sheet, row, col))?.like;
      return style ? book.isBold(book.styleAt(sheet, style.row, style.col)) : book.isBold(book.styleAt(sheet, row, col));
    },
  };
}
