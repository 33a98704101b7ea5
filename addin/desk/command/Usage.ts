/** A command used wrongly; the message says what is needed. */
export class UsageError extends Error {
  override name = 'UsageError';
}

export const USAGE = `rootsum: worksheet functions for measurement uncertainty, without Excel

  rootsum recalc BOOK.xlsx --out NEW.xlsx         compute a workbook and write it as a new file
  rootsum apply PLAN.json BOOK.xlsx... --out-dir DIR
                                                  add the columns of a plan to workbooks
  rootsum audit BOOK.xlsx... [--json]             tell whether the formulas of workbooks are read right
  rootsum functions [--json]                      list the functions
  rootsum serve [BOOK.xlsx] [--port N]            show a workbook in the browser, the pane beside it

  rootsum COMMAND --help                          more about one command

No workbook that is given is ever changed. Exit status: 0; 1 when a cell, a column or a workbook was
refused (each is named, the rest is done); 2 for wrong usage.`;

export const RECALC_HELP = `rootsum recalc BOOK.xlsx --out NEW.xlsx

Computes the formulas without a stored result, every ROOTSUM function, and all cells that depend on
them. Every other cell keeps its stored result. Only what changed is written; charts, styles, names
and all else stay as they are. Cells that cannot be computed are named, and their old results removed.

  --out NEW.xlsx    the file to write; it may not be BOOK.xlsx itself
  --values          write the library's results as plain values, for readers without the add-in
  --help            this text`;

export const APPLY_HELP = `rootsum apply PLAN.json BOOK.xlsx... --out-dir DIR

Adds the columns that a plan lists to each workbook, computes them, and writes each workbook under its
own name into DIR. A column whose place is taken is refused; one that is there already is left alone.
The schema of a plan is addin/desk/command/plan.schema.json.

  --out-dir DIR     the folder for the new files; made if it does not exist
  --values          write the library's results as plain values, for readers without the add-in
  --help            this text`;

export const AUDIT_HELP = `rootsum audit BOOK.xlsx... [--json]

Computes every native formula of each workbook from its stored inputs and compares the result with the
stored one. Names what differs, the worst first, and every function that cannot be followed. Formulas
with TODAY, NOW or RAND keep their stored value and are counted. Nothing is written. Exit status: 0 where
all agree; 1 where something differs, cannot be followed, or a workbook cannot be read.

  --json            an object a workbook on standard output (a list for several), words on standard error
  --help            this text`;

export const FUNCTIONS_HELP = `rootsum functions [--json]

Lists the functions with their arguments.

  --json            the metadata as Excel reads it (functions.json)
  --help            this text`;

export const SERVE_HELP = `rootsum serve [BOOK.xlsx] [--port N]

Serves the desk's page to this machine: the workbook as a grid, formulas with completion, the task pane
beside it. Without a workbook it opens the demo. Nothing leaves the machine, and the file is not
changed: the page saves a new one.

  --port N          the port, 3040 unless another is given; 0 takes a free one
  --help            this text`;
