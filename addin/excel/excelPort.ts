/// <reference types="office-js" />
import type { WorkbookPort } from '../../functions/workbook';
import { readHiddenRows } from './readHiddenRows';
import { readDateSystem, readNames, readSheets, readTables } from './readStructure';
import { readTiles } from './readTiles';
import { inWords } from './run';
import type { Run } from './run';

export type { Run } from './run';

/** A port that is told when the workbook may have changed. */
export interface ExcelPort extends WorkbookPort {
  changed(): void;
}

/**
 * The workbook behind Office.js, for reading. One call is one batch of a few round trips. Calls in one turn of the event loop see one
 * revision; a later turn never trusts what was read before, for a change may not have been told.
 *
 * @throws PortRefusal where the host refuses, or an area is too large to be read.
 */
export function excelPort(given: Run = Excel.run): ExcelPort {
  const run = inWords(given);
  let revision = 0;
  let sameTurn = false;
  return {
    changed: () => void revision++,
    revision: () => {
      if (!sameTurn) {
        sameTurn = true;
        revision++;
        setTimeout(() => { sameTurn = false; });
      }
      return revision;
    },
    sheets: () => run(readSheets),
    date1904: () => run(readDateSystem),
    names: () => run(readNames),
    tables: () => run(readTables),
    hiddenRows: (sheet) => run((context) => readHiddenRows(context, sheet)),
    read: (areas) => run((context) => readTiles(context, areas)),
  };
}
