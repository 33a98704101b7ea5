"""What the ordinary books hold: sheets of constants and formulas as offices, schools and laboratories write them. All data are invented.

A book is a list of sheets; a sheet has a name, cells by address (formulas begin with "=", array formulas are ("A1:B2", "=...")), and
may have rows that are hidden, a filter (range, column, condition, rows that it leaves out) and a table.
"""
from random import Random


def sheet(name, cells, **more):
    return dict(name=name, cells=cells, arrays={}, hidden=[], filter=None, table=None) | more


def column(letter, first, values):
    return {f"{letter}{first + i}": v for i, v in enumerate(values)}


def rows(first, count, **templates):
    """Formulas or values down a column: each template is text with {r} for the row and {p} for the row before, or a function of i."""
    cells = {}
    for letter, template in templates.items():
        for i in range(count):
            r = first + i
            cells[f"{letter}{r}"] = template(i) if callable(template) else template.format(r=r, p=r - 1)
    return cells


def gradebook():
    draw = Random(11)
    n = 40
    names = ["Ada", "Bo", "Cleo", "Dan", "Eve", "Finn", "Gil", "Hal", "Ivy", "Jo"]
    cells = {"A1": "Student", "B1": "Test 1", "C1": "Test 2", "D1": "Project", "E1": "Weighted", "F1": "Grade", "G1": "Rank", "H1": "z", "I1": "Label",
             "L1": "From", "M1": "Grade", "O1": "Weight", "O2": 0.3, "O3": 0.3, "O4": 0.4}
    cells |= column("L", 2, [0, 50, 60, 70, 80, 90]) | column("M", 2, ["F", "E", "D", "C", "B", "A"])
    cells |= rows(2, n, A=lambda i: f"{names[i % 10]} {i // 10 + 1}", B=lambda i: draw.randint(35, 100), C=lambda i: draw.choice(["", draw.randint(30, 100)]) if i % 9 == 4 else draw.randint(30, 100),
                  D=lambda i: round(draw.uniform(40, 100), 1),
                  E='=ROUND($O$2*B{r}+$O$3*N(C{r})+$O$4*D{r},1)',
                  F='=VLOOKUP(E{r},$L$2:$M$7,2,TRUE)', G='=RANK(E{r},$E$2:$E$41)', H='=(E{r}-AVERAGE($E$2:$E$41))/STDEV($E$2:$E$41)',
                  I='=UPPER(LEFT(A{r},1))&MID(A{r},2,LEN(A{r}))&": "&TEXT(E{r},"0.0")&IF(ISNUMBER(C{r}),""," (one test missing)")')
    cells = {k: v for k, v in cells.items() if v != ""}
    summary = {"A1": "Count", "B1": "=COUNT(Grades!E2:E41)", "A2": "Mean", "B2": "=AVERAGE(Grades!E2:E41)", "A3": "Median", "B3": "=MEDIAN(Grades!E2:E41)",
               "A4": "Best", "B4": '=INDEX(Grades!A2:A41,MATCH(MAX(Grades!E2:E41),Grades!E2:E41,0))', "A5": "Upper tenth", "B5": "=PERCENTILE(Grades!E2:E41,0.9)",
               "A6": "Quartile", "B6": "=QUARTILE(Grades!E2:E41,1)", "A7": "Passed", "B7": '=COUNTIF(Grades!F2:F41,"<>F")/COUNTA(Grades!F2:F41)',
               "A8": "Skew", "B8": "=SKEW(Grades!E2:E41)", "A9": "Kurtosis", "B9": "=KURT(Grades!E2:E41)", "A10": "Correlation", "B10": "=CORREL(Grades!B2:B41,Grades!D2:D41)",
               "A11": "Absent", "B11": "=COUNTBLANK(Grades!C2:C41)", "A12": "Third best", "B12": "=LARGE(Grades!E2:E41,3)", "A13": "Spread", "B13": "=MAX(Grades!E2:E41)-MIN(Grades!E2:E41)",
               "A14": "Trimmed", "B14": "=TRIMMEAN(Grades!E2:E41,0.2)", "D1": "Grade", "E1": "How many", "F1": "Share", "G1": "Mean"}
    for i, g in enumerate("FEDCBA"):
        summary |= {f"D{i + 2}": g, f"E{i + 2}": f'=COUNTIF(Grades!$F$2:$F$41,D{i + 2})', f"F{i + 2}": f"=E{i + 2}/SUM($E$2:$E$7)",
                    f"G{i + 2}": f'=IFERROR(AVERAGEIF(Grades!$F$2:$F$41,D{i + 2},Grades!$E$2:$E$41),"none")'}
    return [sheet("Grades", cells), sheet("Summary", summary)]


def calibration():
    draw = Random(12)
    levels = [0, 0.5, 1, 2, 4, 6, 8, 10]
    cells = {"A1": "mg/L", "B1": "Signal", "C1": "Fitted", "D1": "Residual", "E1": "Leverage"}
    for i, x in enumerate(levels):
        r = i + 2
        cells |= {f"A{r}": x, f"B{r}": round(0.012 + 0.0847 * x + draw.gauss(0, 0.002), 4), f"C{r}": f"=$H$2+$H$1*A{r}", f"D{r}": f"=B{r}-C{r}",
                  f"E{r}": f"=1/$H$5+(A{r}-$H$6)^2/$H$7"}
    cells |= {"G1": "slope", "H1": "=SLOPE(B2:B9,A2:A9)", "G2": "intercept", "H2": "=INTERCEPT(B2:B9,A2:A9)", "G3": "r squared", "H3": "=RSQ(B2:B9,A2:A9)",
              "G4": "s(y/x)", "H4": "=STEYX(B2:B9,A2:A9)", "G5": "n", "H5": "=COUNT(A2:A9)", "G6": "mean", "H6": "=AVERAGE(A2:A9)", "G7": "Sxx", "H7": "=DEVSQ(A2:A9)",
              "G8": "t", "H8": "=TINV(0.05,H5-2)", "G9": "t again", "H9": "=_xlfn.T.INV.2T(0.05,H5-2)", "G10": "check", "H10": "=SUM(D2:D9)",
              "G11": "s again", "H11": "=SQRT(SUMSQ(D2:D9)/(H5-2))", "G12": "forecast", "H12": "=FORECAST(5,B2:B9,A2:A9)"}
    samples = {"A1": "Sample", "B1": "Signal 1", "C1": "Signal 2", "D1": "Dilution", "E1": "Mean", "F1": "mg/L", "G1": "s(x)", "H1": "Result", "I1": "Shown", "J1": "Flag"}
    samples |= rows(2, 60, A=lambda i: f"W-{i + 1:03d}", B=lambda i: round(draw.uniform(0.01, 0.95), 4), C=lambda i: round(draw.uniform(0.01, 0.95), 4), D=lambda i: draw.choice([1, 1, 2, 5, 10]),
                    E="=AVERAGE(B{r}:C{r})", F="=(E{r}-Line!$H$2)/Line!$H$1",
                    G="=Line!$H$4/Line!$H$1*SQRT(1/2+1/Line!$H$5+(E{r}-AVERAGE(Line!$B$2:$B$9))^2/(Line!$H$1^2*Line!$H$7))",
                    H="=F{r}*D{r}", I='=IF(F{r}<0.25,"<"&TEXT(0.25*D{r},"0.00"),FIXED(H{r},2,TRUE))', J='=IF(OR(F{r}>10,ABS(B{r}-C{r})>0.5),"repeat",IF(F{r}<0,"below 0","ok"))')
    arrays = {"A12:B16": "=LINEST(B2:B9,A2:A9,TRUE,TRUE)", "D12:D14": "=TREND(B2:B9,A2:A9,A6:A8)"}
    return [sheet("Line", cells, arrays=arrays), sheet("Samples", samples)]


def loan():
    cells = {"A1": "Sum", "B1": 185000, "A2": "Rate a year", "B2": 0.0425, "A3": "Years", "B3": 15, "A4": "Start", "B4": 45306, "A5": "Payment", "B5": "=-PMT(B2/12,B3*12,B1)",
             "A6": "Paid in all", "B6": "=B5*B3*12", "A7": "Interest", "B7": "=SUM(D11:D70)", "A8": "Check", "B8": "=-CUMIPMT(B2/12,B3*12,B1,1,60,0)",
             "A10": "Month", "B10": "Due", "C10": "Balance", "D10": "Interest", "E10": "Repaid", "F10": "Left", "G10": "Weekday", "H10": "Workday", "I10": "Quarter"}
    cells |= {"A11": 1, "B11": "=EDATE(B4,A11)", "C11": "=B1"}
    cells |= rows(12, 59, A="=A{p}+1", B="=EDATE($B$4,A{r})", C="=F{p}")
    cells |= rows(11, 60, D="=ROUND(C{r}*$B$2/12,2)", E="=ROUND($B$5,2)-D{r}", F="=C{r}-E{r}", G='=CHOOSE(WEEKDAY(B{r}),"Su","Mo","Tu","We","Th","Fr","Sa")',
                  H="=WORKDAY(B{r}-1,1)", I='="Q"&ROUNDUP(MONTH(B{r})/3,0)&" "&YEAR(B{r})')
    year = {"A1": "Year", "B1": "Interest", "C1": "Repaid", "D1": "Left", "E1": "Days", "F1": "Working days", "G1": "Month ends"}
    year |= rows(2, 5, A=lambda i: 2024 + i, B='=SUMPRODUCT((YEAR(Plan!$B$11:$B$70)=A{r})*Plan!$D$11:$D$70)',
                 C='=SUMIFS(Plan!$E$11:$E$70,Plan!$B$11:$B$70,">="&DATE(A{r},1,1),Plan!$B$11:$B$70,"<="&DATE(A{r},12,31))',
                 D="=LOOKUP(DATE(A{r},12,31),Plan!$B$11:$B$70,Plan!$F$11:$F$70)", E="=DATE(A{r}+1,1,1)-DATE(A{r},1,1)",
                 F="=NETWORKDAYS(DATE(A{r},1,1),DATE(A{r},12,31))", G='=TEXT(EOMONTH(DATE(A{r},2,1),0),"yyyy-mm-dd")')
    year |= {"A9": "Years to half", "B9": "=NPER(Plan!B2/12,-Plan!B5,Plan!B1,-Plan!B1/2)/12", "A10": "Value of it", "B10": "=PV(3%/12,180,-Plan!B5)", "A11": "Rate of it", "B11": "=RATE(180,-Plan!B5,Plan!B1)*12",
             "A12": "Effective", "B12": "=EFFECT(Plan!B2,12)", "A13": "Age", "B13": '=DATEDIF(DATE(2001,3,14),Plan!B4,"y")&" years "&DATEDIF(DATE(2001,3,14),Plan!B4,"ym")&" months"'}
    return [sheet("Plan", cells), sheet("Years", year)]


def store():
    draw = Random(13)
    kinds = ["acid", "base", "buffer", "solvent", "standard"]
    body = rows(4, 50, A=lambda i: f"{draw.choice(kinds)} {draw.randint(1, 20):02d}", B=lambda i: draw.choice(["shelf A", "shelf B", "cold room"]), C=lambda i: draw.randint(0, 40), D=lambda i: round(draw.uniform(2, 90), 2),
                E="=C{r}*D{r}", F='=IF(C{r}<5,"order",IF(C{r}<10,"soon",""))', G='=LEFT(A{r},FIND(" ",A{r})-1)')
    cells = {"A1": "Stock of reagents", "A3": "Item", "B3": "Place", "C3": "Number", "D3": "Price", "E3": "Value", "F3": "Action", "G3": "Kind",
             "A54": "Total", "C54": "=SUBTOTAL(109,C4:C53)", "D54": "=SUBTOTAL(101,D4:D53)", "E54": "=SUBTOTAL(9,E4:E53)", "A56": "all", "E56": "=SUM(E4:E53)", "A57": "with totals passed over", "E57": "=SUBTOTAL(9,E4:E54)",
             "A58": "largest", "E58": "=_xlfn.AGGREGATE(14,5,E4:E53,1)", "A59": "shown", "E59": "=SUBTOTAL(103,A4:A53)", "A60": "median shown", "E60": "=_xlfn.AGGREGATE(12,5,E4:E53)"} | body
    out = [r for r in range(4, 54) if cells[f"B{r}"] == "shelf B"]
    by_kind = {"A1": "Kind", "B1": "Items", "C1": "Number", "D1": "Value", "E1": "Dearest", "F1": "Cheapest", "G1": "Share", "H1": "Rank", "J1": "Looking for", "K1": "acid*"}
    for i, kind in enumerate(kinds):
        r = i + 2
        by_kind |= {f"A{r}": kind, f"B{r}": f'=COUNTIF(Stock!$A$4:$A$53,A{r}&" *")', f"C{r}": f'=SUMIF(Stock!$G$4:$G$53,A{r},Stock!$C$4:$C$53)',
                    f"D{r}": f'=SUMPRODUCT((Stock!$G$4:$G$53=A{r})*(Stock!$C$4:$C$53)*(Stock!$D$4:$D$53))', f"E{r}": f'=_xlfn.MAXIFS(Stock!$D$4:$D$53,Stock!$G$4:$G$53,A{r})',
                    f"F{r}": f'=_xlfn.MINIFS(Stock!$D$4:$D$53,Stock!$G$4:$G$53,A{r})', f"G{r}": f"=TEXT(D{r}/SUM($D$2:$D$6),\"0.0%\")", f"H{r}": f"=RANK(D{r},$D$2:$D$6)"}
    by_kind |= {"J2": "value", "K2": "=SUMIF(Stock!A4:A53,K1,Stock!E4:E53)", "J3": "in the cold", "K3": '=COUNTIFS(Stock!B4:B53,"cold*",Stock!C4:C53,">10")', "J4": "first", "K4": '=IFERROR(VLOOKUP(K1,Stock!A4:E53,5,FALSE),"no")',
                "J5": "words", "K5": '=_xlfn.TEXTJOIN(", ",TRUE,A2:A6)', "J6": "proper", "K6": '=PROPER(SUBSTITUTE(K5,"base","alkali"))', "J7": "clean", "K7": '=TRIM("  two   words ")&"|"&REPT("-",3)'}
    later = {"A1": "Item", "B1": "Number", "C1": "Each", "D1": "Sum"} | rows(2, 8, A=lambda i: f"part {i + 1}", B=lambda i: draw.randint(1, 9), C=lambda i: round(draw.uniform(1, 9), 2), D="=Parts[[#This Row],[Number]]*Parts[[#This Row],[Each]]")
    later |= {"F1": "=SUM(Parts[Sum])", "F2": "=AVERAGE(Parts[Each])", "F3": "=ROWS(Parts)", "F4": '=INDEX(Parts[Item],MATCH(MAX(Parts[Sum]),Parts[Sum],0))'}
    return [sheet("Stock", cells, filter=("A3:G53", 1, 'x != "shelf B"', out), hidden=[]), sheet("Kinds", by_kind), sheet("Later", later, table=("A1:D9", "Parts", ["Item", "Number", "Each", "Sum"], {"Sum": "=Parts[[#This Row],[Number]]*Parts[[#This Row],[Each]]"}))]


def control():
    draw = Random(14)
    cells = {"A1": "Day", "B1": "Found", "C1": "Recovery", "D1": "Moving range", "E1": "Mean of 5", "F1": "Outside", "G1": "Trend", "H1": "Density",
             "K1": "Target", "L1": 50, "K2": "Mean", "L2": "=AVERAGE(B2:B61)", "K3": "s", "L3": "=_xlfn.STDEV.S(B2:B61)", "K4": "Upper", "L4": "=L2+3*L3", "K5": "Lower", "L5": "=L2-3*L3", "K6": "From ranges", "L6": "=AVERAGE(D3:D61)/1.128",
             "K7": "Warnings", "L7": '=COUNTIF(F2:F61,"warn*")', "K8": "Bias %", "L8": "=(L2-L1)/L1*100", "K9": "t", "L9": "=ABS(L2-L1)/(L3/SQRT(COUNT(B2:B61)))", "K10": "p", "L10": "=TDIST(L9,COUNT(B2:B61)-1,2)",
             "K11": "F", "L11": "=FTEST(B2:B31,B32:B61)", "K12": "Days", "L12": "=MAX(A2:A61)-MIN(A2:A61)", "K13": "Last", "L13": "=INDEX(B:B,COUNTA(B:B))", "K14": "Last ten", "L14": "=AVERAGE(OFFSET(B1,COUNTA(B:B)-10,0,10,1))",
             "K15": "Visible", "L15": "=SUBTOTAL(101,B2:B61)", "K16": "All", "L16": "=SUBTOTAL(1,B2:B61)", "K17": "Chi", "L17": "=CHIINV(0.05,59)", "K18": "Mode", "L18": "=MODE(B2:B61)"}
    cells |= rows(2, 60, A=lambda i: 45658 + i + i // 5 * 2, B=lambda i: round(50.4 + draw.gauss(0, 1.1), 1), C="=B{r}/$L$1",
                  F='=IF(ABS(B{r}-$L$2)>3*$L$3,"action",IF(ABS(B{r}-$L$2)>2*$L$3,"warning",""))', H="=NORMDIST(B{r},$L$2,$L$3,FALSE)")
    cells |= rows(3, 59, D="=ABS(B{r}-B{p})", G='=SIGN(B{r}-B{p})')
    for r in range(6, 62):
        cells[f"E{r}"] = f"=AVERAGE(B{r - 4}:B{r})"
    bins = {"A1": "Up to", "B1": "How many", "C1": "Expected"}
    for i in range(8):
        bins |= {f"A{i + 2}": 47.5 + i, f"C{i + 2}": f"=60*NORMDIST(A{i + 2},Chart!$L$2,Chart!$L$3,TRUE)"}
    return [sheet("Chart", cells, hidden=[10, 11, 12]), sheet("Bins", bins, arrays={"B2:B10": "=FREQUENCY(Chart!B2:B61,A2:A9)"})]


def solutions():
    draw = Random(15)
    cells = {"A1": "pH", "B1": "H+", "C1": "OH-", "D1": "Share HA", "E1": "Share A-", "F1": "Buffer", "G1": "Degree", "J1": "pKa", "K1": 4.76, "J2": "pKw", "K2": 14, "J3": "c", "K3": 0.1}
    cells |= {"A2": 2}
    cells |= rows(3, 40, A="=A{p}+0.25")
    cells |= rows(2, 41, B="=10^-A{r}", C="=10^(A{r}-$K$2)", D="=B{r}/(B{r}+10^-$K$1)", E="=1-D{r}", F="=LN(10)*(B{r}+C{r}+$K$3*D{r}*E{r})", G='=IF(E{r}>0.99,"salt",IF(E{r}<0.01,"acid",ROUND(E{r}*100,1)&" %"))')
    vectors = {"A1": 2, "B1": 1, "C1": 0, "A2": 1, "B2": 3, "C2": 1, "A3": 0, "B3": 1, "C3": 4, "E1": 3, "E2": 5, "E3": 9, "A9": "det", "B9": "=MDETERM(A1:C3)", "A10": "norm", "B10": "=SQRT(SUMSQ(E1:E3))", "A11": "angle", "B11": "=DEGREES(ACOS(SUMPRODUCT(A1:A3,E1:E3)/SQRT(SUMSQ(A1:A3)*SUMSQ(E1:E3))))",
               "A12": "best", "B12": "=SUMXMY2(A1:A3,E1:E3)", "A13": "hex", "B13": '=DEC2HEX(255)&"-"&DEC2BIN(10)&"-"&BIN2DEC("1101")', "A14": "mol", "B14": '=CONVERT(25,"C","K")', "A15": "steps", "B15": "=FACT(5)/COMBIN(6,2)+GCD(48,36)+LCM(4,6)+MOD(-7,3)+INT(-2.5)+TRUNC(-2.5)",
               "A16": "near zero", "B16": "=0.5-0.4-0.1", "A17": "signs", "B17": "=-2^2+2^-1", "A18": "per cent", "B18": "=200*5%", "A19": "text", "B19": '="3"+4', "A20": "compare", "B20": '="a"="A"'}
    arrays = {"G1:I3": "=MINVERSE(A1:C3)", "K1:K3": "=MMULT(MINVERSE(A1:C3),E1:E3)", "A5:C7": "=TRANSPOSE(A1:C3)", "E5": "=SUM(IF(A1:C3>1,A1:C3,0))", "E6": "=MAX(ABS(A1:A3-E1:E3))"}
    mixed = {"A1": "Value", "B1": "What", "C1": "As number", "D1": "Length", "E1": "Rounded", "F1": "Safe"}
    odd = [12.345, "12.5", "<0.1", True, "", -7, "n.d.", 1e-12, 1e15, "3/4", 0, "  8 "]
    for i, v in enumerate(odd):
        r = i + 2
        if v != "":
            mixed[f"A{r}"] = v
        mixed |= {f"B{r}": f'=IF(ISBLANK(A{r}),"blank",IF(ISNUMBER(A{r}),"number",IF(ISTEXT(A{r}),"text","truth")))', f"C{r}": f'=IFERROR(VALUE(TRIM(A{r})),"no number")', f"D{r}": f"=LEN(A{r})", f"E{r}": f'=IF(ISNUMBER(A{r}),ROUND(A{r},2),"")',
                  f"F{r}": f'=IF(ISNUMBER(A{r}),IF(A{r}>0,LOG10(A{r}),"none"),"none")'}
    mixed |= {"A16": "=SUM(A2:A13)", "A17": "=COUNT(A2:A13)", "A18": "=COUNTA(A2:A13)", "A19": '=COUNTIF(A2:A13,"<0.5")', "A20": "=MAX(A2:A13)", "A21": "=AVERAGEA(A2:A3)", "A22": '=SUMPRODUCT(--ISNUMBER(A2:A13))'}
    return [sheet("Buffer", cells), sheet("Vectors", vectors, arrays=arrays), sheet("Mixed", mixed)]


BOOKS = {"gradebook": gradebook, "calibration": calibration, "loan": loan, "store": store, "control": control, "solutions": solutions}
