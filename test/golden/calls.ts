/**
 * Calls of every native function that the golden workbooks hold: ordinary arguments, edges and wrong ones, one function a line,
 * calls apart by " | ". The names `nums`, `other` … are ranges of the sheet Data (see `goldenData.ts`).
 */
const families: Readonly<Record<string, string>> = {
  mathematics: `
    ABS: -2.5 | 0 | nums | "x"
    ACOS: 0.3 | 1 | 1.5
    ACOSH: 2 | 1 | 0.5
    ACOT: 2 | 0 | "a"
    ACOTH: 3 | -2 | 0.5
    ARABIC: "MCMXCIX" | "-IV" | "Q"
    ASIN: 0.3 | -1 | 2
    ASINH: 2 | -0.1
    ATAN: 5 | "1"
    ATAN2: 1,2 | -1,0 | 0,0
    ATANH: 0.5 | 1
    BASE: 255,16 | 7,2,8 | 7,1
    CEILING: 2.1,0.5 | -2.5,-1 | -2.5,1 | 3,0
    CEILING.MATH: 6.3,5 | -5.5,2 | -5.5,2,1
    CEILING.PRECISE: 4.3,2 | -4.3,2 | 4.3,-2
    COMBIN: 8,2 | 5.9,2.9 | 2,3
    COMBINA: 4,3 | 0,0 | 2,-1
    COS: 1 | 0
    COSH: 1.5
    COT: 0.7 | 0
    COTH: 2 | 0
    CSC: 1 | 0
    CSCH: 1.5 | 0
    DECIMAL: "FF",16 | "zap",36 | "2",2
    DEGREES: 1.2
    EVEN: 1.5 | -1 | 0
    EXP: 1 | 710
    FACT: 5 | 5.9 | -1 | 171
    FACTDOUBLE: 6 | 7 | -2
    FLOOR: 3.7,2 | -2.5,-2 | -2.5,2 | 3,0
    FLOOR.MATH: 24.3,5 | -8.1,2 | -5.5,2,1
    FLOOR.PRECISE: -3.2,-1 | 3.2,1 | 3.2,0
    GCD: 24,36 | 7.9,14 | -3,6
    INT: 8.9 | -8.9
    ISO.CEILING: 4.3 | -4.3,2
    LCM: 24,36 | 5,0 | -3,6
    LN: 86 | 0
    LOG: 8,2 | 100 | -1 | 8,1
    LOG10: 86 | 0
    MDETERM: square | {1,2;3,4} | nums
    MINVERSE: {4}
    MMULT: {1,2},{3;4} | {1,2},{3,4}
    MOD: 3,2 | -3,2 | 3,-2 | 3,0 | 7.25,0.5
    MROUND: 10,3 | -10,-3 | 5,-2
    MULTINOMIAL: 2,3,4 | 0 | -1,2
    MUNIT: 1
    ODD: 1.5 | -2 | 0 | 3
    PI: 
    POWER: 5,2 | 4,0.5 | -8,0.5 | 0,-1
    PRODUCT: nums | 2,"3",TRUE | mixed
    QUOTIENT: 5,2 | -10,3 | 1,0
    RADIANS: 270
    ROMAN: 499 | 1999,0 | 0 | 4000
    ROUND: 2.15,1 | -1.475,2 | 21.5,-1 | 1.005,2
    ROUNDDOWN: 3.2,0 | -3.14159,1 | 31415.92654,-2
    ROUNDUP: 3.2,0 | -3.14159,1 | 31415.92654,-2
    SEC: 1
    SECH: 1
    SERIESSUM: 0.785,0,2,{1,-0.5,0.041666} | 2,1,1,sorted
    SIGN: 10 | 0 | -0.1
    SIN: 2.5
    SINH: 1
    SQRT: 16 | -1
    SQRTPI: 2 | -1
    SUM: nums | nums,other | 1,"3",TRUE | mixed | bad
    SUMIF: nums,">2" | nums,">2",other | words,"*p*",nums | words,"fig",nums | nums,"<>7",other
    SUMIFS: other,nums,">0",nums,"<8" | other,words,"a*"
    SUMPRODUCT: nums,other | nums*other | nums,sorted
    SUMSQ: 3,4 | nums | mixed
    SUMX2MY2: nums,other | nums,sorted
    SUMX2PY2: nums,other | nums,sorted
    SUMXMY2: nums,other | nums,sorted
    TAN: 0.785
    TANH: 0.5
    TRUNC: 8.9 | -8.9 | 3.14159,3 | 123.4,-2
    AGGREGATE: 9,4,nums | 14,6,nums,2 | 15,6,bad,1 | 9,6,bad | 9,4,bad | 12,4,nums | 13,4,nums | 16,4,nums,0.3 | 17,4,nums,1 | 18,4,nums,0.3 | 19,4,nums,1 | 20,4,nums | 1,8,nums
    SUBTOTAL: 9,nums | 1,nums | 5,nums | 2,mixed | 3,mixed | 4,nums | 6,nums | 7,nums | 8,nums | 10,nums | 11,nums | 109,nums | 12,nums | 0,nums
    ERF: 0.745 | 0.2,1 | -1
    ERFC: 1 | 4 | -0.5
    ERF.PRECISE: 0.745 | -1
    ERFC.PRECISE: 1 | 4 | -0.5
    DELTA: 5,4 | 5,5 | 0
    GESTEP: 5,4 | -4,-5 | -1`,
  statistics: `
    AVEDEV: nums | mixed | "x"
    AVERAGE: nums | nums,other | mixed | words | 1,"3"
    AVERAGEA: nums | mixed | words
    AVERAGEIF: nums,">2" | nums,">2",other | nums,">99"
    AVERAGEIFS: other,nums,">0",nums,"<8" | other,nums,">99"
    CONFIDENCE: 0.05,2.5,50 | 0,2.5,50
    CONFIDENCE.NORM: 0.05,2.5,50 | 0.05,-1,50
    CONFIDENCE.T: 0.05,1,50 | 0.05,1,1
    CORREL: nums,other | nums,sorted
    COUNT: nums | mixed | words,1,"2" | bad
    COUNTA: nums | mixed | words | bad
    COUNTBLANK: mixed | nums
    COUNTIF: nums,">2" | words,"fig" | words,"*p*" | words,"?ig" | mixed,"" | mixed,"7" | nums,7
    COUNTIFS: nums,">0",other,"<6" | words,"a*",nums,">0"
    COVAR: nums,other | nums,sorted
    COVARIANCE.P: nums,other | nums,sorted
    COVARIANCE.S: nums,other | nums,sorted
    DEVSQ: nums | mixed
    FISHER: 0.75 | 1 | -0.3
    FISHERINV: 0.972955 | 0
    FORECAST: 30,nums,other | 30,nums,sorted
    FORECAST.LINEAR: 3,nums,other
    FREQUENCY: nums,5
    GEOMEAN: other | nums | sorted
    GROWTH: sorted,{1;2;3;4;5;6},7
    HARMEAN: other | nums | sorted
    INTERCEPT: nums,other | nums,sorted
    KURT: nums | other | 1,2,3
    LARGE: nums,2 | nums,0 | nums,9
    LINEST: nums,other
    LOGEST: sorted,{1;2;3;4;5;6}
    MAX: nums | mixed | words | 1,"9",TRUE
    MAXA: nums | mixed | words
    MAXIFS: other,nums,">0" | other,nums,">99"
    MEDIAN: nums | other | words
    MIN: nums | mixed | words
    MINA: nums | mixed | other
    MINIFS: other,nums,">0" | other,nums,">99"
    MODE: nums | other | 1,2,2,3,3
    MODE.SNGL: nums | other
    PEARSON: nums,other | nums,sorted
    PERCENTILE: nums,0.3 | nums,0 | nums,1.1
    PERCENTILE.EXC: nums,0.3 | nums,0.01 | nums,1
    PERCENTILE.INC: nums,0.3 | nums,1 | nums,-1
    PERCENTRANK: nums,5 | nums,6 | nums,99 | nums,6,5
    PERCENTRANK.EXC: nums,5 | nums,6 | nums,99
    PERCENTRANK.INC: nums,5 | nums,6 | nums,-2
    PERMUT: 100,3 | 3,2 | 2,3
    PERMUTATIONA: 3,2 | 2,3 | -1,2
    PROB: {0,1,2,3},{0.2,0.3,0.1,0.4},2 | {0,1,2,3},{0.2,0.3,0.1,0.4},1,3 | {0,1},{0.2,0.3},1
    QUARTILE: nums,1 | nums,3 | nums,5
    QUARTILE.EXC: nums,1 | nums,3 | nums,4
    QUARTILE.INC: nums,1 | nums,2 | nums,-1
    RANK: 7,nums | 7,nums,1 | 99,nums
    RANK.AVG: 7,nums | 7,nums,1
    RANK.EQ: 7,nums | 7,nums,1
    RSQ: nums,other | nums,sorted
    SKEW: nums | other | 1,1
    SKEW.P: nums | other
    SLOPE: nums,other | nums,sorted
    SMALL: nums,2 | nums,0 | nums,9
    STANDARDIZE: 42,40,1.5 | 42,40,0
    STDEV: nums | mixed | 1
    STDEV.P: nums | mixed
    STDEV.S: nums | mixed
    STDEVA: nums | mixed
    STDEVP: nums | other
    STDEVPA: nums | mixed
    STEYX: nums,other | nums,sorted
    TREND: nums,other,3
    TRIMMEAN: nums,0.3 | nums,0 | nums,1
    VAR: nums | mixed
    VAR.P: nums | mixed
    VAR.S: nums | mixed
    VARA: nums | mixed
    VARP: nums | other
    VARPA: nums | mixed`,
  distributions: `
    BETA.DIST: 2,8,10,TRUE,1,3 | 2,8,10,FALSE,1,3 | 0.4,2,3,TRUE
    BETA.INV: 0.685470581,8,10,1,3 | 0.3,2,3
    BETADIST: 2,8,10,1,3 | 0.4,2,3
    BETAINV: 0.685470581,8,10,1,3 | 2,2,3
    BINOM.DIST: 6,10,0.5,FALSE | 6,10,0.5,TRUE | 11,10,0.5,TRUE
    BINOM.INV: 6,0.5,0.75 | 100,0.5,0.2
    BINOMDIST: 6,10,0.5,FALSE | 6.9,10.9,0.5,TRUE
    CHIDIST: 18.307,10 | 0,5
    CHIINV: 0.050001,10 | 0.5,3
    CHISQ.DIST: 0.5,1,TRUE | 2,3,FALSE | -1,3,TRUE
    CHISQ.DIST.RT: 18.307,10 | 18.307,10.9
    CHISQ.INV: 0.93,1 | 0.6,2 | 1.5,2
    CHISQ.INV.RT: 0.050001,10 | 0.5,0
    CHISQ.TEST: {58,35;11,25;10,23},{45.35,47.65;17.56,18.44;16.09,16.91}
    CHITEST: {58,35;11,25;10,23},{45.35,47.65;17.56,18.44;16.09,16.91}
    CRITBINOM: 6,0.5,0.75
    EXPON.DIST: 0.2,10,TRUE | 0.2,10,FALSE | -1,10,TRUE
    EXPONDIST: 0.2,10,TRUE | 0.2,0,TRUE
    F.DIST: 15.2069,6,4,TRUE | 15.2069,6,4,FALSE
    F.DIST.RT: 15.2069,6,4 | 1,2,3
    F.INV: 0.01,6,4 | 0.5,3,7
    F.INV.RT: 0.01,6,4 | 0,6,4
    F.TEST: nums,other
    FDIST: 15.2069,6,4 | -1,6,4
    FINV: 0.01,6,4
    FTEST: nums,other
    GAMMA: 2.5 | -3.75 | 0
    GAMMA.DIST: 10.00001131,9,2,FALSE | 10.00001131,9,2,TRUE
    GAMMA.INV: 0.068094,9,2
    GAMMADIST: 10.00001131,9,2,TRUE | -1,9,2,TRUE
    GAMMAINV: 0.068094,9,2 | 2,9,2
    GAMMALN: 4 | 4.5 | 0
    GAMMALN.PRECISE: 4.5 | -1
    GAUSS: 2 | -1.5
    HYPGEOM.DIST: 1,4,8,20,TRUE | 1,4,8,20,FALSE
    LOGINV: 0.039084,3.5,1.2
    LOGNORM.DIST: 4,3.5,1.2,TRUE | 4,3.5,1.2,FALSE
    LOGNORM.INV: 0.039084,3.5,1.2
    LOGNORMDIST: 4,3.5,1.2 | 0,3.5,1.2
    NEGBINOM.DIST: 10,5,0.25,TRUE | 10,5,0.25,FALSE
    NEGBINOMDIST: 10,5,0.25
    NORM.DIST: 42,40,1.5,TRUE | 42,40,1.5,FALSE | 42,40,0,TRUE
    NORM.INV: 0.908789,40,1.5 | 0,40,1.5
    NORM.S.DIST: 1.333333,TRUE | 1.333333,FALSE | -8,TRUE
    NORM.S.INV: 0.908789 | 1
    NORMDIST: 42,40,1.5,TRUE | 42,40,1.5,FALSE
    NORMINV: 0.908789,40,1.5
    NORMSDIST: 1.333333 | -3
    NORMSINV: 0.9088 | 0.025
    PHI: 0.75
    POISSON: 2,5,TRUE | 2.9,5,FALSE
    POISSON.DIST: 2,5,TRUE | 2,5,FALSE | -1,5,TRUE
    T.DIST: 60,1,TRUE | 8,3,FALSE | -1.2,5,TRUE
    T.DIST.2T: 1.959999998,60 | -1,60
    T.DIST.RT: 1.959999998,60 | -1,5
    T.INV: 0.75,2 | 0.025,9
    T.INV.2T: 0.546449,60 | 0.05,9.9
    T.TEST: nums,other,2,1 | nums,other,1,2 | nums,other,2,3
    TDIST: 1.959999998,60,2 | 1.959999998,60,1 | -1,60,2
    TINV: 0.054645,60 | 0.05,0
    TTEST: nums,other,2,1 | nums,other,2,3
    WEIBULL: 105,20,100,TRUE | 105,20,100,FALSE
    WEIBULL.DIST: 105,20,100,TRUE | -1,20,100,TRUE
    Z.TEST: nums,4 | nums,6,3
    ZTEST: nums,4 | nums,6,3`,
  lookups: `
    ADDRESS: 2,3 | 2,3,2 | 2,3,3,TRUE,"Two words" | 0,1 | 2,3,2,FALSE
    AREAS: nums | (nums,other)
    CELL: "row",nums | "col",nums | "contents",nums | "type",words | "type",nums
    CHOOSE: 2,10,20,30 | 2.9,10,20,30 | 4,10,20,30
    COLUMN: other | Data!C7
    COLUMNS: square | nums
    HLOOKUP: 3,{1,3,5;"a","b","c"},2 | 4,{1,3,5;"a","b","c"},2 | 4,{1,3,5;"a","b","c"},2,FALSE | 0,{1,3;2,4},1
    INDEX: nums,3 | square,2,3 | nums,9 | square,2,4 | LOGEST(counts,sorted,TRUE,TRUE),1,1 | LOGEST(counts,sorted,TRUE,TRUE),2,1 | LOGEST(counts,sorted,TRUE,TRUE),2,2 | LOGEST(counts,sorted,TRUE,TRUE),3,1 | LOGEST(counts,sorted,TRUE,TRUE),3,2 | LOGEST(counts,sorted,TRUE,TRUE),4,1 | LOGEST(counts,sorted,TRUE,TRUE),5,2
    INDIRECT: "Data!A3" | "Data!R3C1",FALSE | "nowhere!A1" | "Data!A"&2
    LOOKUP: 5,sorted | 5,sorted,counts | 0,sorted | "fig",{"apple","fig","pear"},{1,2,3}
    MATCH: 5,sorted | 5,sorted,0 | 4,sorted,0 | "*ple*",words,0 | 5,{9,7,5,3},-1 | 0,sorted
    OFFSET: Data!A1,2,1 | Data!A1,-1,0
    ROW: Data!C7 | nums
    ROWS: nums | square
    TRANSPOSE: {5}
    VLOOKUP: 3,{1,"a";3,"b";5,"c"},2 | 4,{1,"a";3,"b";5,"c"},2 | 4,{1,"a";3,"b";5,"c"},2,FALSE | 0,{1,"a";3,"b"},2 | "b*",{"abc",1;"bcd",2},2,FALSE
    AND: TRUE,1 | TRUE,0 | "x" | nums
    FALSE: 
    IF: 1,2,3 | 0,2 | "x",1,2 | nums>99,1,2
    IFERROR: 1/0,5 | 4,5 | bad,"e"
    IFNA: NA(),5 | 1/0,5
    IFS: FALSE,1,TRUE,2 | FALSE,1
    NOT: 1 | 0 | "x"
    OR: FALSE,0 | 0,3 | nums
    SWITCH: 2,1,"a",2,"b" | 9,1,"a","none" | 9,1,"a"
    TRUE: 
    XOR: TRUE,TRUE | TRUE,FALSE,FALSE
    ERROR.TYPE: 1/0 | NA() | 1
    ISBLANK: Data!C4 | Data!A1 | ""
    ISERR: 1/0 | NA() | 1
    ISERROR: NA() | 1
    ISEVEN: 4 | 3.9 | -1 | 0
    ISLOGICAL: TRUE | 1
    ISNA: NA() | 1/0
    ISNONTEXT: 1 | "a" | Data!C4
    ISNUMBER: 1 | "1" | Data!A1
    ISODD: 4 | 3.9 | -1
    ISREF: nums | 1
    ISFORMULA: INDEX(nums,1)
    ISTEXT: "a" | 1 | Data!D1
    N: 7 | TRUE | "x" | Data!A2
    NA: 
    T: "a" | 1 | TRUE
    TYPE: 1 | "a" | TRUE | 1/0 | {1,2}`,
  texts: `
    CHAR: 65 | 49 | 0 | 256
    CLEAN: "a"&CHAR(7)&"b" | "abc"
    CODE: "A" | "" | "abc"
    CONCAT: "a",1,TRUE | words
    CONCATENATE: "a",1,TRUE | words
    DOLLAR: 1234.567,2 | -1234.567 | 0.5,0
    EXACT: "a","a" | "a","A"
    FIND: "M","Miriam" | "m","Miriam" | "M","Miriam",3 | "","abc"
    FIXED: 1234.567,1 | 1234.567,-1 | -1234.567,-1,TRUE | 44.332
    LEFT: "abcdef",2 | "abc" | "abc",0 | "abc",-1 | 12345,2
    LEN: "abc" | "" | 12.5
    LOWER: "E. E. Cummings" | TRUE
    MID: "Fluid Flow",1,5 | "Fluid Flow",7,20 | "Fluid",20,5 | "a",0,1
    NUMBERVALUE: "2.500,27",",","." | "3.5%" | "x" | ""
    PROPER: "this is a TITLE" | "2-way street" | "76BudGet"
    REPLACE: "abcdefghijk",6,5,"*" | "2009",3,2,"10" | "abc",0,1,"x"
    REPT: "*-",3 | "a",0 | "a",-1 | "ab",2.9
    RIGHT: "Sale Price",5 | "abc" | "abc",9
    SEARCH: "e","Statements",6 | "M?r","xMir" | "~*","a*b" | "z","abc"
    SUBSTITUTE: "Sales Data","Sales","Cost" | "Quarter 1, 2008","1","2",1 | "aaa","a","b",2 | "aaa","",1
    TEXT: 1234.567,"0.00" | 0.285,"0.0%" | 1234567,"#,##0" | 45292,"yyyy-mm-dd" | -5,"0.0;(0.0)"
    TEXTJOIN: ", ",TRUE,"a","","b" | "-",FALSE,mixed | "",TRUE,words
    TRIM: "  First   Quarter " | 12
    UNICHAR: 66 | 8364 | 0
    UNICODE: "B" | "€" | ""
    UPPER: "total" | "ß"
    VALUE: "12.5" | "$1,000" | "5%" | "x" | "16:48" | "1e3"`,
  dates: `
    DATE: 2024,1,31 | 2024,14,1 | 2024,1,-5 | 108,1,2 | -1,1,1
    DATEDIF: 36526,45292,"Y" | 36526,45292,"M" | 36526,45292,"D" | 36526,45350,"YM" | 45292,36526,"D"
    DATEVALUE: "2024-03-15" | "x"
    DAY: 45350 | 0 | -1
    DAYS: 45350,45292 | "2024-03-15","2024-02-01"
    DAYS360: 45292,45350 | 45292,45657,TRUE
    EDATE: 45322,1 | 45292,-1 | 45292,1.9
    EOMONTH: 45292,1 | 45292,-3
    HOUR: 0.75 | 45292.25 | "7:45"
    ISOWEEKNUM: 45292 | 36526
    MINUTE: 0.53 | "12:45"
    MONTH: 45350 | 45657.9
    NETWORKDAYS: 45292,45350 | 45292,45350,days | 45350,45292
    NETWORKDAYS.INTL: 45292,45350,11 | 45292,45350,"0000011"
    SECOND: 0.700023148 | "4:48:18"
    TIME: 12,0,0 | 16,48,10 | 25,0,0 | -1,0,0
    TIMEVALUE: "2:24 PM" | "18:00"
    WEEKDAY: 45292 | 45292,2 | 45292,3 | 45292,9
    WEEKNUM: 45292 | 45350,2 | 45350,21
    WORKDAY: 45292,10 | 45292,-10 | 45292,10,days
    WORKDAY.INTL: 45292,10,7 | 45292,10,"0000011"
    YEAR: 45350 | 36526
    YEARFRAC: 45292,45473 | 45292,45473,1 | 45292,45473,2 | 45292,45473,3 | 45292,45473,4`,
  engineering: `
    BESSELI: 1.5,1
    BESSELJ: 1.9,2 | 0,0
    BESSELK: 1.5,1
    BESSELY: 2.5,1
    BIN2DEC: 1100100 | "1111111111" | 2
    BIN2HEX: 11111011,4 | 1110
    BIN2OCT: 1001,3 | 1100100
    BITAND: 13,25 | 1,5 | -1,5
    BITLSHIFT: 4,2 | 4,-1
    BITOR: 23,10
    BITRSHIFT: 13,2 | 13,-1
    BITXOR: 5,3
    COMPLEX: 3,4 | 3,4,"j" | 0,1 | 1,0 | 3,4,"k"
    CONVERT: 1,"lbm","kg" | 68,"F","C" | 2.5,"ft","m" | 1,"kg","m"
    DEC2BIN: 9,4 | -100 | 512
    DEC2HEX: 100,4 | -54
    DEC2OCT: 58,3 | -100
    HEX2BIN: "F",8 | "B7"
    HEX2DEC: "A5" | "FFFFFFFF5B" | "G"
    HEX2OCT: "F",3 | "3B4E"
    IMABS: "5+12i" | "x"
    IMAGINARY: "3+4i" | "0-j" | "4"
    IMARGUMENT: "3+4i" | "0"
    IMCONJUGATE: "3+4i"
    IMCOS: "1+i"
    IMDIV: "-238+240i","10+24i" | "1","0"
    IMEXP: "1+i"
    IMLN: "3+4i"
    IMLOG10: "3+4i"
    IMLOG2: "3+4i"
    IMPOWER: "2+3i",3
    IMPRODUCT: "3+4i","5-3i" | "1+2i",30
    IMREAL: "6-9i" | "i"
    IMSIN: "4+3i"
    IMSQRT: "1+i"
    IMSUB: "13+4i","5+3i"
    IMSUM: "3+4i","5-3i"
    OCT2BIN: 3,3
    OCT2DEC: 54 | "7777777533"
    OCT2HEX: 100,4`,
  finance: `
    CUMIPMT: 0.0075,360,125000,13,24,0
    CUMPRINC: 0.0075,360,125000,13,24,0
    DB: 1000000,100000,6,1,7
    DDB: 2400,300,10,1 | 2400,300,10,2,1.5
    EFFECT: 0.0525,4 | 0,4
    FV: 0.005,10,-200,-500,1 | 0,10,-200
    IPMT: 0.00833,1,36,8000
    IRR: {-70000,12000,15000,18000,21000,26000} | {1,2}
    MIRR: {-120000,39000,30000,21000,37000,46000},0.1,0.12
    NOMINAL: 0.053543,4
    NPER: 0.01,-100,-1000,10000,1 | 0,-100,1000
    ISPMT: 0.1,1,36,8000000
    DOLLARDE: 1.02,16 | 1.1,32 | 1,0
    DOLLARFR: 1.125,16 | 1.125,32
    FVSCHEDULE: 1,{0.09,0.11,0.1}
    XNPV: 0.09,{-10000,2750,4250,3250,2750},{39448,39508,39751,39859,39904} | -0.5,{-1,2},{1,2}
    XIRR: {-10000,2750,4250,3250,2750},{39448,39508,39751,39859,39904} | {1,2},{1,2}
    NPV: 0.1,-10000,3000,4200,6800 | 0.1,nums
    PMT: 0.00667,10,10000 | 0,10,10000
    PPMT: 0.00833,1,24,2000
    PV: 0.00667,240,500 | 0,12,5
    RATE: 48,-200,8000
    RRI: 96,10000,11000
    SLN: 30000,7500,10 | 1,1,0
    SYD: 30000,7500,10,1
    DAVERAGE: table,"size",wanted
    DCOUNT: table,"size",wanted
    DCOUNTA: table,"tree",wanted
    DGET: table,"size",wanted
    DMAX: table,"size",wanted
    DMIN: table,"size",wanted
    DPRODUCT: table,"size",wanted
    DSTDEV: table,"size",wanted
    DSTDEVP: table,"size",wanted
    DSUM: table,"size",wanted | table,3,wanted | table,"weight",wanted
    DVAR: table,"size",wanted
    DVARP: table,"size",wanted`,
};

/** The formulas of one function, without their leading `=`. */
export interface Calls {
  readonly name: string;
  readonly formulas: readonly string[];
}

/** Calls by family. */
export const goldenCalls: ReadonlyMap<string, readonly Calls[]> = new Map(
  Object.entries(families).map(([family, lines]) => [family, lines.trim().split('\n').map(callsOf)]),
);

function callsOf(line: string): Calls {
  const [, name, calls] = /^\s*([A-Z0-9.]+): ?(.*)$/.exec(line)!;
  return { name, formulas: calls.split(' | ').map((args) => `${name}(${args.trim()})`) };
}
