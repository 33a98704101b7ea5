/** A task as a laboratory says it, and the steps. Lines that begin with = are formulas to type. */
export interface Task {
  readonly title: string;
  readonly steps: readonly string[];
}

export const guide: readonly Task[] = [
  {
    title: 'I have a tolerance column',
    steps: [
      'Beside the column of half-widths (say D2:D61), type one formula into the first row; it spills down.',
      '=ROOTSUM.STDU_FROM_TOL(D2:D61)',
      'Values near the middle more likely than at the ends? Say so: "triangular". The column now holds standard uncertainties: it is the evidence for UNC_CARRY.',
      '=ROOTSUM.UNC_CARRY(G2:G61, B2:B61, E2:E61)',
    ],
  },
  {
    title: 'I have replicates',
    steps: [
      'A block of readings, one sample a row. With TRUE at the end, degrees of freedom and shape come along, and the three columns together are the evidence.',
      '=ROOTSUM.STDU_FROM_REPEATS(B2:E21, , , , TRUE)',
      'The results may use AVERAGE(B2:E2): give its cells, F2:F21, as inputs, not the readings.',
      '=ROOTSUM.UNC_REPORT(H2:H21, , F2:F21, I2:K21)',
    ],
  },
  {
    title: 'One pipette, many samples',
    steps: [
      'The doubt of one pipette is the same doubt in every sample. Write the evidence once, with a tag in its fourth column: u | degrees of freedom | shape | tag.',
      'Where one evidence row serves several input cells of one result, the library asks which is meant: a tag (one source, effects add with their signs) or each (independent of one another).',
      '=ROOTSUM.UNC_CARRY(F2:F41, B2:B41, $M$2:$P$2)',
      'Whether two results are correlated by it, UNC_CORREL shows.',
    ],
  },
  {
    title: 'A limit to compare with',
    steps: [
      'The rule first: agree with the customer. The guarded limit for a risk of 5 % of a wrong acceptance:',
      '=ROOTSUM.UNC_GUARD(50, C2)',
      'The verdict in words, with the rule beside it:',
      '=ROOTSUM.UNC_DECIDE(B2:B41, C2:C41, , 50)',
      'How sure, as a probability:',
      '=ROOTSUM.UNC_CONFORM(B2:B41, C2:C41, , 50)',
    ],
  },
  {
    title: 'Control-chart data',
    steps: [
      'A year of results of a control sample has a spread that holds for the method from day to day. Its standard deviation is the u of one determination by this method; the degrees of freedom are n − 1.',
      '=STDEV.S(Chart!B2:B61)',
      'Several charts pooled: standard deviations and their degrees of freedom side by side.',
      '=ROOTSUM.SD_POOL(B2:B5, C2:C5)',
      'The bias of the method belongs beside it: reference materials or rounds of comparison.',
      '=ROOTSUM.STDU_FROM_BIAS(B2:B7, C2:C7)',
      'Both together, in one unit:',
      '=ROOTSUM.UNC_COMBINE(E2:E3)',
    ],
  },
];
