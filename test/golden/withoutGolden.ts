/** Native functions that LibreOffice 7.4 does not have, or that give nothing one cell can hold: their own tests carry published examples. */
export const withoutGolden: ReadonlySet<string> = new Set(`
  XLOOKUP XMATCH SEQUENCE SORT SORTBY FILTER UNIQUE TAKE DROP EXPAND CHOOSECOLS CHOOSEROWS HSTACK VSTACK TOCOL TOROW WRAPCOLS WRAPROWS
  MAP REDUCE SCAN BYROW BYCOL MAKEARRAY TEXTBEFORE TEXTAFTER TEXTSPLIT HYPGEOMDIST BINOM.DIST.RANGE MODE.MULT PDURATION`.trim().split(/\s+/));
