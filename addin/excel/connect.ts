/// <reference types="office-js" />
import type { PaneHost } from '../pane/PaneHost';
import { excelPaneHost } from './excelPaneHost';
import { excelPort } from './excelPort';
import type { Run } from './excelPort';

/** Names that the functions bundle looks up at each call, and what the host may have put there. */
interface Surroundings {
  Office?: { onReady(): Promise<{ host: unknown }>; actions?: { associate(id: string, action: (event: { completed(): void }) => void): void } };
  open?: (address: string, target: string) => unknown;
  Excel?: { run: Run };
  document?: { getElementById(id: string): unknown };
  RootsumPort?: unknown;
  RootsumHost?: { readonly decimalSeparator: '.' | ',' };
}

/**
 * Connects the functions and the pane with Excel.
 *
 * @param openPane   Loads the pane's code; called where the page has an element `pane` only.
 * @returns whether there is an Excel to connect with.
 */
export async function connect(around: object, openPane: () => Promise<{ mountPane(root: HTMLElement, host: PaneHost): unknown }>): Promise<boolean> {
  const surroundings = around as Surroundings;
  if (!surroundings.Office) return false;
  const { host } = await surroundings.Office.onReady();
  if (!host || !surroundings.Excel) return false;
  const { run } = surroundings.Excel;
  const port = excelPort(run);
  const decimalSeparator = await separator(run);
  surroundings.RootsumPort = port;
  surroundings.RootsumHost = { decimalSeparator };
  const paneHost = excelPaneHost(port, decimalSeparator, run);
  const { actions } = surroundings.Office;
  // The names stand in the manifest, with the buttons of the ribbon.
  actions?.associate('rootsumTakeBack', (event) => void paneHost.undo().finally(() => event.completed()));
  actions?.associate('rootsumReference', (event) => {
    surroundings.open?.('reference.html', '_blank');
    event.completed();
  });
  const root = surroundings.document?.getElementById('pane');
  if (root) {
    const { mountPane } = await openPane();
    mountPane(root as HTMLElement, paneHost);
  }
  return true;
}

/** The user's decimal separator; a point where the host does not tell. */
async function separator(run: Run): Promise<'.' | ','> {
  try {
    return await run(async (context) => {
      const format = context.workbook.application.cultureInfo.numberFormat;
      format.load('numberDecimalSeparator');
      await context.sync();
      return format.numberDecimalSeparator === ',' ? ',' : '.';
    });
  } catch {
    return '.';
  }
}
