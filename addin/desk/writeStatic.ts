/** Copies the pages and their styles into dist, and builds the demo's workbook beside them: `npm run static`. */
import { copyFileSync, existsSync, mkdirSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { buildDemoBook } from './demo/buildDemoBook';

const from = (path: string): string => fileURLToPath(new URL(path, import.meta.url));
const folder = process.argv[2] ?? from('../../dist');
mkdirSync(folder, { recursive: true });
for (const [path, name] of [['page/desk.html', 'index.html'], ['page/desk.css', 'desk.css'], ['../pane/pane.css', 'pane.css'], ['../excel/taskpane.html', 'taskpane.html'], ['../excel/about.html', 'about.html']] as const)
  if (existsSync(from(path))) copyFileSync(from(path), join(folder, name));
writeFileSync(join(folder, 'demo.xlsx'), buildDemoBook());
