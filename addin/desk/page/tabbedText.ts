/** Cells as a text for the clipboard: tabs between, one row a line; a text with a tab, a line end or a quote stands in quotes. */
export const tabbedText = (cells: readonly (readonly string[])[]): string =>
  cells.map((row) => row.map((text) => (/[\t\n"]/.test(text) ? `"${text.replaceAll('"', '""')}"` : text)).join('\t')).join('\n');

/** Cells of a text from the clipboard: tabs between, one row a line, quotes doubled inside quotes. */
export function cellsOfText(text: string): string[][] {
  const rows: string[][] = [[]];
  for (const [, quoted, plain, end] of text.replace(/\r\n?/g, '\n').replace(/\n$/, '').matchAll(/(?:"((?:[^"]|"")*)"|([^\t\n]*))(\t|\n|$)/g)) {
    rows[rows.length - 1].push(quoted !== undefined ? quoted.replaceAll('""', '"') : plain);
    if (end === '\n') rows.push([]);
    if (end === '') break;
  }
  return rows;
}
