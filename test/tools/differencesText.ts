import { nativeNames } from '../../functions/engine/formula/natives';
import { notSmooth } from '../engine/formula/crosscheck/notSmooth';
import { differences } from '../engine/formula/differences';
import { disagreements } from '../golden/disagreements';

/** The page of differences from Excel, from the lists that the tests run. */
export function differencesPage(): string {
  const valuesOnly = notSmooth.filter((n) => n.why === 'values only').map((n) => n.name).sort();
  const byReason = new Map<string, string[]>();
  for (const [formula, why] of disagreements) byReason.set(why, [...(byReason.get(why) ?? []), formula]);
  return `# Differences from Excel

Made by \`npm run table\` from the lists that the tests run; do not edit. Nothing here has been compared with a running Excel: "there"
is what its documentation says, or common practice.

## What is known to differ, or may

| about | here | in Excel |
|---|---|---|
${differences.map((d) => `| ${d.about}${d.shown ? `: \`${cell(d.shown.formula)}\`` : ''} | ${cell(d.here)} | ${cell(d.there)} |`).join('\n')}

## Functions that are computed but not followed

Their values are recomputed and audited. Where one of their numeric arguments is uncertain, carrying refuses, for its slope is not known here (a
probability by its degrees of freedom, say):
${valuesOnly.join(', ')}.

## Functions that are read

${nativeNames().length} functions; any other is refused by name: ${nativeNames().join(', ')}.

## Where LibreOffice, which computed the golden workbooks, gives something else

Excel's documentation decides; the reason is beside each.

| formulas | reason |
|---|---|
${[...byReason].map(([why, formulas]) => `| ${formulas.map((f) => `\`${cell(f)}\``).join(', ')} | ${cell(why)} |`).join('\n')}
`;
}

const cell = (text: string): string => text.replace(/\|/g, '\\|');
