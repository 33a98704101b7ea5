/**
 * Number formats that a file names by id only, as en-US shows them.
 *
 * @source  ECMA-376 part 1, 18.8.30 (numFmt); ids 5 to 8 and 37 to 44 as en-US, where the standard leaves them to the locale.
 */
export const BUILT_IN_FORMATS: ReadonlyMap<number, string> = new Map([
  [0, 'General'], [1, '0'], [2, '0.00'], [3, '#,##0'], [4, '#,##0.00'],
  [5, '"$"#,##0_);\\("$"#,##0\\)'], [6, '"$"#,##0_);[Red]\\("$"#,##0\\)'],
  [7, '"$"#,##0.00_);\\("$"#,##0.00\\)'], [8, '"$"#,##0.00_);[Red]\\("$"#,##0.00\\)'],
  [9, '0%'], [10, '0.00%'], [11, '0.00E+00'], [12, '# ?/?'], [13, '# ??/??'],
  [14, 'm/d/yyyy'], [15, 'd-mmm-yy'], [16, 'd-mmm'], [17, 'mmm-yy'],
  [18, 'h:mm AM/PM'], [19, 'h:mm:ss AM/PM'], [20, 'h:mm'], [21, 'h:mm:ss'], [22, 'm/d/yyyy h:mm'],
  [37, '#,##0_);(#,##0)'], [38, '#,##0_);[Red](#,##0)'], [39, '#,##0.00_);(#,##0.00)'], [40, '#,##0.00_);[Red](#,##0.00)'],
  [41, '_(* #,##0_);_(* \\(#,##0\\);_(* "-"_);_(@_)'], [42, '_("$"* #,##0_);_("$"* \\(#,##0\\);_("$"* "-"_);_(@_)'],
  [43, '_(* #,##0.00_);_(* \\(#,##0.00\\);_(* "-"??_);_(@_)'],
  [44, '_("$"* #,##0.00_);_("$"* \\(#,##0.00\\);_("$"* "-"??_);_(@_)'],
  [45, 'mm:ss'], [46, '[h]:mm:ss'], [47, 'mm:ss.0'], [48, '##0.0E+0'], [49, '@'],
]);

/** The built-in id of a format that reads the same in every locale. */
export function builtInId(format: string): number | undefined {
  for (const [id, text] of BUILT_IN_FORMATS) {
    if (text === format && (id <= 4 || (id >= 9 && id <= 13) || id === 48 || id === 49)) return id;
  }
  return undefined;
}
