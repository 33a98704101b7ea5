/** The letters of a column: 1 is A, 27 is AA. */
export function columnLetters(col: number): string {
  let letters = '';
  for (let n = col; n > 0; n = Math.floor((n - 1) / 26)) letters = String.fromCharCode(65 + ((n - 1) % 26)) + letters;
  return letters;
}

/** A cell address as a person writes it, with its sheet where one is given: `Sheet1!B7`, `'My sheet'!B7`. */
export function cellName(row: number, col: number, sheet?: string): string {
  const cell = `${columnLetters(col)}${row}`;
  return sheet === undefined ? cell : `${sheetPrefix(sheet)}${cell}`;
}

/** A sheet name before an address, quoted where it has to be. */
export function sheetPrefix(sheet: string): string {
  return /^[A-Za-z_][A-Za-z0-9_.]*$/.test(sheet) && !/^[A-Za-z]{1,3}\d+$/.test(sheet) ? `${sheet}!` : `'${sheet.replace(/'/g, "''")}'!`;
}
