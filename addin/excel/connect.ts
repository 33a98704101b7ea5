/// <reference types="office-js" />
import type { PaneHost } from '../pane/PaneHost';
import { excelPaneHost } from './excelPaneHost';
import { excelPort } from './excelPort';
import type { ExcelPort, Run } from './excelPort';
import { waitingPort } from './waitingPort';

/** Names that the functions bundle looks up at each call, and what the host may have put there. */
interface Surroundings {
  Office?: {
    onReady(): Promise<{ host: unknown }>;
    context?: { requirements?: { isSetSupported(name: string, version: string): boolean } };
    actions?: { associate(id: string, action: (event: { completed(): void }) => void): void };
  };
  Excel?: { run<T>(options: { delayForCellEdit: boolean }, batch: (context: Excel.RequestContext) => Promise<T>): Promise<T> };
  document?: { getElementById(id: string): unknown };
  open?: (address: string, target: string) => unknown;
  RootsumPort?: unknown;
  RootsumHost?: { readonly decimalSeparator: '.' | ',' };
}

interface Connection {
  readonly port: ExcelPort;
  readonly run: Run;
}

/**
 * Connects the functions and the pane with Excel. The port is there at once; what is asked of it waits until Excel is ready.
 *
 * @param openPane   Loads the pane's code; called where the page has an element `pane` only.
 * @returns whether there is an Excel to connect with.
 */
export async function connect(around: object, openPane: () => Promise<{ mountPane(root: HTMLElement, host: PaneHost): unknown }>): Promise<boolean> {
  const surroundings = around as Surroundings;
  if (!surroundings.Office) return false;
  const connecting = reach(surroundings);
  surroundings.RootsumPort = waitingPort(connecting.then((c) => c?.port));
  const connection = await connecting;
  if (!connection) return false;
  const { port, run } = connection;
  const decimalSeparator = await separator(run);
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

/** Excel once it is ready; undefined outside of it, and where it is too old to be read safely. */
async function reach(surroundings: Surroundings): Promise<Connection | undefined> {
  const office = surroundings.Office;
  const { host } = await office!.onReady();
  const found = surroundings.Excel; // looked up now: the host may have put it there only when it was ready
  if (!host || !found) return undefined;
  // Spills and row properties: without them cells could be misread.
  if (office!.context?.requirements?.isSetSupported('ExcelApi', '1.12') === false) return undefined;
  // While a user types into a cell the host refuses to be read; then it waits.
  const run: Run = (batch) => found.run({ delayForCellEdit: true }, batch);
  return { port: excelPort(run), run };
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
