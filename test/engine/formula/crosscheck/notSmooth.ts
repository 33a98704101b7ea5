/** A native function without a row in the table of smooth ones. */
export interface NotSmooth {
  readonly name: string;
  readonly why: 'constant' | 'rounding' | 'count' | 'decision' | 'selection' | 'function' | 'text' | 'values only';
}

/**
 * Functions whose slopes are not derivatives, so that differences cannot check them:
 * constant    takes no argument, or only a size
 * rounding    slope 1 by convention where the true one is 0
 * count       a number, a position: slope 0 to what was looked at
 * decision    a truth value, or a value passed through by a condition
 * selection   a value picked out of others, or a sum or mean of those that meet a condition
 * function    has the slopes of the function that is handed to it
 * text        made from text, or read out of text
 * values only  in steps, or with a slope that is not known here: carry refuses where an uncertain number reaches it
 */
export const notSmooth: readonly NotSmooth[] = [
  ...listed('constant', 'PI TRUE FALSE NA MUNIT'),
  ...listed('rounding', 'MROUND ROUND ROUNDDOWN ROUNDUP'),
  ...listed('count', 'COUNT COUNTA COUNTBLANK COUNTIF COUNTIFS COLUMN COLUMNS ROW ROWS MATCH XMATCH'),
  ...listed('count', 'AREAS CELL ERROR.TYPE TYPE LEN FIND SEARCH'),
  ...listed('decision', 'AND OR NOT XOR IF IFS IFERROR IFNA SWITCH'),
  ...listed('decision', 'EXACT ISBLANK ISERR ISERROR ISEVEN ISLOGICAL ISNA ISNONTEXT ISNUMBER ISODD ISFORMULA ISREF ISTEXT'),
  ...listed('selection', 'AVERAGEIF AVERAGEIFS MAXIFS MINIFS SUMIF SUMIFS CHOOSE INDEX LOOKUP HLOOKUP VLOOKUP XLOOKUP N T'),
  ...listed('selection', 'CHOOSECOLS CHOOSEROWS DROP EXPAND FILTER HSTACK INDIRECT OFFSET SORT SORTBY TAKE TOCOL TOROW'),
  ...listed('selection', 'TRANSPOSE UNIQUE VSTACK WRAPCOLS WRAPROWS'),
  ...listed('function', 'AGGREGATE BYCOL BYROW MAKEARRAY MAP REDUCE SCAN SUBTOTAL'),
  ...listed('count', 'DELTA GESTEP EVEN ODD QUOTIENT GCD LCM'),
  ...listed('count', 'COMBIN COMBINA FACT FACTDOUBLE FREQUENCY MULTINOMIAL PERMUT PERMUTATIONA RANK RANK.AVG RANK.EQ'),
  ...listed('values only', 'BINOM.INV CHISQ.TEST CHITEST CRITBINOM F.TEST FTEST GAMMA GAMMALN GAMMALN.PRECISE HYPGEOM.DIST HYPGEOMDIST MODE MODE.MULT MODE.SNGL'),
  ...listed('values only', 'PERCENTRANK PERCENTRANK.EXC PERCENTRANK.INC T.TEST TTEST Z.TEST ZTEST'),
  ...listed('count', 'BITAND BITLSHIFT BITOR BITRSHIFT BITXOR'),
  ...listed('values only', 'CEILING CEILING.MATH CEILING.PRECISE FLOOR FLOOR.MATH FLOOR.PRECISE ISO.CEILING'),
  ...listed('values only', 'DAYS360 NETWORKDAYS.INTL WORKDAY.INTL'),
  ...listed('selection', 'DAVERAGE DCOUNT DCOUNTA DGET DMAX DMIN DPRODUCT DSTDEV DSTDEVP DSUM DVAR DVARP'),
  ...listed('values only', 'CUMIPMT CUMPRINC DB DDB DOLLARDE DOLLARFR EFFECT FVSCHEDULE ISPMT XIRR XNPV FV IPMT IRR MIRR NOMINAL NPER NPV PDURATION PMT PPMT PV RATE RRI SLN SYD'),
  ...listed('text', 'ARABIC BASE BIN2HEX BIN2OCT COMPLEX DEC2OCT DECIMAL DOLLAR HEX2BIN HEX2OCT OCT2BIN OCT2DEC OCT2HEX ROMAN'),
  ...listed('text', 'IMABS IMAGINARY IMARGUMENT IMCONJUGATE IMCOS IMDIV IMEXP IMLN IMLOG10 IMLOG2 IMPOWER IMPRODUCT IMREAL IMSIN IMSQRT IMSUB IMSUM'),
  ...listed('values only', 'DATE DATEDIF DAY DAYS EDATE EOMONTH HOUR ISOWEEKNUM MINUTE MONTH NETWORKDAYS SECOND TIME WEEKDAY WEEKNUM WORKDAY YEAR YEARFRAC'),
  ...listed('text', 'BIN2DEC CHAR CLEAN CODE DATEVALUE DEC2BIN DEC2HEX FIXED HEX2DEC NUMBERVALUE PROPER REPLACE TEXTAFTER TEXTBEFORE TEXTJOIN TEXTSPLIT'),
  ...listed('text', 'TIMEVALUE UNICHAR UNICODE'),
  ...listed('text', 'ADDRESS CONCAT CONCATENATE LEFT LOWER MID REPT RIGHT SUBSTITUTE TEXT TRIM UPPER VALUE'),
];

function listed(why: NotSmooth['why'], names: string): NotSmooth[] {
  return names.split(' ').map((name) => ({ name, why }));
}
