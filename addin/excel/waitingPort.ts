import { PortRefusal } from '../../functions/workbook';
import type { WorkbookPort } from '../../functions/workbook';

/**
 * A port that is there before the workbook is: its answers wait until it is known through which port to read. Excel may call the
 * functions as soon as they are loaded.
 *
 * @param ready   The port; undefined where this Excel cannot be read, which every answer then says.
 */
export function waitingPort(ready: Promise<WorkbookPort | undefined>): WorkbookPort {
  let there: WorkbookPort | undefined;
  void ready.then((port) => { there = port; });
  let asked = 0;
  const port = async (): Promise<WorkbookPort> => {
    const found = await ready;
    if (!found) throw new PortRefusal('needs an Excel that tells of spills and of rows that do not show (ExcelApi 1.12)');
    return found;
  };
  return {
    revision: () => there?.revision() ?? --asked, // what was begun before is never taken up again
    sheets: async () => (await port()).sheets(),
    names: async () => (await port()).names(),
    tables: async () => (await port()).tables(),
    date1904: async () => (await port()).date1904(),
    hiddenRows: async (sheet) => (await port()).hiddenRows(sheet),
    read: async (areas) => (await port()).read(areas),
  };
}
