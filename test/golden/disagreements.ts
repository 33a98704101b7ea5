/** Why the other program's stored result is not what a call gives here. */
const REASONS = {
  name: 'LibreOffice has errors of its own, which it saves as #VALUE!; the vendor\'s documentation names the error given here',
  boolean: 'LibreOffice holds TRUE as the number 1, in cells and as an argument',
} as const;

/** Formulas whose result differs from LibreOffice's, with the reason; the vendor's documentation was read for each. */
export const disagreements: ReadonlyMap<string, string> = new Map([
  ...each(REASONS.name, `
    ACOSH(0.5) | ACOTH(0.5) | ATANH(1) | FLOOR(3,0) | GCD(-3,6) | LCM(-3,6) | LN(0) | LOG(-1) | LOG(8,1) | LOG10(0) | QUOTIENT(1,0) |
    SQRT(-1) | SQRTPI(-1) | CORREL(nums,sorted) | FORECAST(30,nums,sorted) | INTERCEPT(nums,sorted) | LARGE(nums,0) | LARGE(nums,9) |
    MEDIAN(words) | PEARSON(nums,sorted) | RSQ(nums,sorted) | SLOPE(nums,sorted) | SMALL(nums,0) | SMALL(nums,9) | STEYX(nums,sorted) |
    INDEX(nums,9) | INDEX(square,2,4) | OFFSET(Data!A1,-1,0) | DATE(-1,1,1) | DATEDIF(45292,36526,"D") | TIME(-1,0,0) | WEEKDAY(45292,9) |
    COMBIN(2,3) | COMBINA(2,-1) | FACT(-1) | FACT(171) | FACTDOUBLE(-2) | MULTINOMIAL(-1,2) | SUMX2MY2(nums,sorted) | SUMX2PY2(nums,sorted) |
    AGGREGATE(15,6,bad,1) | DOLLARDE(1,0) | XIRR({1,2},{1,2}) | SUMXMY2(nums,sorted) | CONFIDENCE(0,2.5,50) | CONFIDENCE.NORM(0.05,-1,50) | COVAR(nums,sorted) | COVARIANCE.P(nums,sorted) |
    COVARIANCE.S(nums,sorted) | FISHER(1) | GEOMEAN(nums) | HARMEAN(nums) | MODE(other) | MODE.SNGL(other) | PERCENTILE(nums,1.1) |
    PERCENTILE.EXC(nums,0.01) | PERCENTILE.EXC(nums,1) | PERCENTILE.INC(nums,-1) | PERCENTRANK(nums,99) | PERCENTRANK.EXC(nums,99) |
    PERMUT(2,3) | PERMUTATIONA(-1,2) | PROB({0,1},{0.2,0.3},1) | QUARTILE(nums,5) | QUARTILE.EXC(nums,4) |
    QUARTILE.INC(nums,-1) | RANK(99,nums) | TRIMMEAN(nums,1) | BETAINV(2,2,3) | BINOM.DIST(11,10,0.5,TRUE) | CHISQ.DIST(-1,3,TRUE) |
    CHISQ.INV(1.5,2) | CHISQ.INV.RT(0.5,0) | EXPONDIST(0.2,0,TRUE) | F.INV.RT(0,6,4) | FDIST(-1,6,4) | GAMMA(0) | GAMMAINV(2,9,2) |
    GAMMALN(0) | GAMMALN.PRECISE(-1) | NORM.DIST(42,40,0,TRUE) | NORM.INV(0,40,1.5) | NORM.S.INV(1) | POISSON.DIST(-1,5,TRUE) |
    BASE(7,1) | DECIMAL("2",2) | BITAND(-1,5) | IMABS("x") | IMARGUMENT("0") | IMDIV("1","0") | T.DIST.2T(-1,60) | TDIST(-1,60,2) | TINV(0.05,0) | WEIBULL.DIST(-1,20,100,TRUE) | BIN2DEC(2) | CONVERT(1,"kg","m") | DEC2BIN(512) | HEX2DEC("G")`),
  ...each('#NUM! by the vendor\'s documentation: the rate must be above 0', 'XNPV(-0.5,{-1,2},{1,2})'),
  ...each('LibreOffice calls a division by zero #NUM! here', 'DSTDEV(table,"size",wanted) | DVAR(table,"size",wanted) | COT(0) | COTH(0) | CSC(0) | CSCH(0) | POWER(0,-1)'),
  ...each(REASONS.boolean, `
    SUBTOTAL(2,mixed) | SUM(mixed) | SUMSQ(mixed) | VAR(mixed) | VAR.S(mixed) | VAR.P(mixed) | COUNT(mixed) | STDEV(mixed) | STDEV.S(mixed) | STDEV.P(mixed) |
    AVERAGE(mixed) | AVEDEV(mixed) | DEVSQ(mixed) | TYPE(TRUE) | CONCAT("a",1,TRUE) | CONCATENATE("a",1,TRUE) | LOWER(TRUE) | TEXTJOIN("-",FALSE,mixed)`),
  ...each('text given as an argument is read as a number; LibreOffice does so only where it is told to', `
    PRODUCT(2,"3",TRUE) | SUM(1,"3",TRUE) | AVERAGE(1,"3") | MAX(1,"9",TRUE)`),
  ...each('#NUM! by the vendor\'s documentation, for the argument is outside the distribution', `
    EXPON.DIST(-1,10,TRUE) | GAMMADIST(-1,9,2,TRUE) | LOGNORMDIST(0,3.5,1.2) | STANDARDIZE(42,40,0)`),
  ...each('a negative numeral is read, by the vendor\'s documentation', 'ARABIC("-IV")'),
  ...each('an en-US workbook writes a negative amount in brackets', 'DOLLAR(-1234.567)'),
  ...each('#NUM! by the vendor\'s documentation: a rate must be above 0, flows must have both signs', 'EFFECT(0,4) | IRR({1,2})'),
  ...each('cut off, not rounded, to its digits: the vendor\'s documentation gives 0.666 for two thirds', `
    PERCENTRANK.EXC(nums,5) | PERCENTRANK(nums,6) | PERCENTRANK.INC(nums,6) | PERCENTRANK(nums,6,5)`),
  ...each('one way to choose nothing of nothing (from memory)', 'COMBINA(0,0)'),
  ...each('#DIV/0! by the vendor\'s documentation of the function', 'ATAN2(0,0)'),
  ...each('#NUM! by the vendor\'s documentation, for the signs differ', 'MROUND(5,-2)'),
  ...each('LibreOffice writes the address as its own sheets have it', 'ADDRESS(2,3,3,TRUE,"Two words")'),
  ...each('LibreOffice takes wildcards only where the file says so', 'VLOOKUP("b*",{"abc",1;"bcd",2},2,FALSE)'),
  ...each('codes run from 1 on', 'CHAR(0) | UNICHAR(0)'),
  ...each('#VALUE! for an empty text by the vendor\'s documentation', 'CODE("")'),
  ...each('an empty text is found at the start (common practice)', 'FIND("","abc")'),
  ...each('percent signs are read, an empty text is 0, by the vendor\'s documentation', 'NUMBERVALUE("3.5%") | NUMBERVALUE("")'),
  ...each('years from 0 to 1899 are counted from 1900, by the vendor\'s documentation', 'DATE(108,1,2)'),
  ...each('the vendor\'s calendar begins with day 0 of January 1900', 'DAY(0) | DAY(-1)'),
  ...each('the pound is 0.45359237 kg exactly', 'CONVERT(1,"lbm","kg")'),
  ...each('a union does not survive LibreOffice\'s writing', 'AREAS((nums,other))'),
]);

function each(why: string, formulas: string): [string, string][] {
  return formulas.trim().split(/\s*\|\s*/).map((formula) => [formula, why]);
}
