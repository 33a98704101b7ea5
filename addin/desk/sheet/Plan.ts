/** Which columns to add to a workbook. As a file: JSON, with the schema in `addin/desk/command/plan.schema.json`. */
export interface Plan {
  readonly $schema?: string;
  readonly title?: string;
  readonly columns: readonly PlanColumn[];
}

/** One column, or several side by side that one formula fills. */
export interface PlanColumn {
  readonly sheet: string;
  /** Where the (first) heading goes: a cell such as K5; or the heading of a column, beside which the new one goes. */
  readonly anchor: string;
  readonly header: string | readonly string[];
  /** As typed into the first row, with its "=". */
  readonly formula: string;
  /** One formula that spills, or one a row. */
  readonly mode: 'spill' | 'perRow';
  /** `6:69`, or `while D has numbers`: from the row below the heading on. */
  readonly rows: string;
  /** One for all columns, or one a column. */
  readonly numberFormat?: string | readonly string[];
}

/** The headings of a column entry. */
export const headersOf = ({ header }: PlanColumn): readonly string[] => (typeof header === 'string' ? [header] : header);
