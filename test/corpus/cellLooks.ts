import { strFromU8, unzipSync } from 'fflate';

/** How each style of a workbook looks: its number format, font, fill, border and alignment as they are written, not by their numbers. */
export function cellLooks(bytes: Uint8Array): string[] {
  const xml = strFromU8(unzipSync(bytes)['xl/styles.xml']);
  const inside = (list: string): string => new RegExp(`<${list}\\b[^>]*>(.*?)</${list}>`, 's').exec(xml)?.[1] ?? '';
  const items = (list: string, item: string): string[] => inside(list).match(new RegExp(`<${item}\\b[^>]*?(?:/>|>.*?</${item}>)`, 'gs')) ?? [];
  const [fonts, fills, borders] = [items('fonts', 'font'), items('fills', 'fill'), items('borders', 'border')];
  const formats = new Map(items('numFmts', 'numFmt').map((f) => [/numFmtId="(\d+)"/.exec(f)![1], /formatCode="([^"]*)"/.exec(f)![1]]));
  return items('cellXfs', 'xf').map((xf) => {
    const of = (name: string): string => new RegExp(` ${name}="(\\d+)"`).exec(xf)?.[1] ?? '0';
    return JSON.stringify([formats.get(of('numFmtId')) ?? of('numFmtId'), fonts[Number(of('fontId'))], fills[Number(of('fillId'))], borders[Number(of('borderId'))], /<alignment[^>]*>/.exec(xf)?.[0], /<protection[^>]*>/.exec(xf)?.[0]]);
  });
}
