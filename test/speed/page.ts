/** How long the desk's page takes until the demo stands there, warm: prints times, asserts nothing. Needs Chromium. */
import { browserPath, startDesk } from '../browser/openPage';

if (!browserPath) console.log('no Chromium: the page was not timed');
else {
  const desk = await startDesk();
  for (let i = 0; i < 4; i++) {
    const page = await desk.browser.newPage();
    const start = performance.now();
    await page.goto(desk.address);
    await page.waitForSelector('td[data-row="5"]');
    const grid = performance.now() - start;
    await page.waitForSelector('.rootsum-pane [role="tab"]');
    console.log(`the demo in the page${i === 0 ? ', cold' : ', warm'}   grid ${grid.toFixed(0)} ms   with the pane ${(performance.now() - start).toFixed(0)} ms`);
    await page.close();
  }
  await desk.close();
}
