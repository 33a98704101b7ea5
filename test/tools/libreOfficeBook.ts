import { libreOfficeBooks } from './libreOfficeBooks';

/** A workbook as LibreOffice saves it; formulas without a stored value are computed. Needs `soffice`. */
export const libreOfficeBook = (book: Uint8Array): Uint8Array => libreOfficeBooks([book])[0];
