import { builtInId } from './builtInFormats';
import { applySplices } from './splice';
import { appendInside, attribute, childOf, childrenOf, parseXml, prefixOf, withAttributes } from './xmlTree';
import type { XmlElement } from './xmlTree';
import { escapeXml } from './xmlText';
import { decodeXstring, encodeXstringAttribute } from './xstring';

/** The smallest style part that Excel opens. */
export function emptyStyles(mainUri: string): string {
  return `<styleSheet xmlns="${mainUri}"><fonts count="1"><font><sz val="11"/><name val="Calibri"/></font></fonts>`
    + '<fills count="2"><fill><patternFill patternType="none"/></fill><fill><patternFill patternType="gray125"/></fill></fills>'
    + '<borders count="1"><border><left/><right/><top/><bottom/><diagonal/></border></borders>'
    + '<cellStyleXfs count="1"><xf numFmtId="0" fontId="0" fillId="0" borderId="0"/></cellStyleXfs>'
    + '<cellXfs count="1"><xf numFmtId="0" fontId="0" fillId="0" borderId="0" xfId="0"/></cellXfs>'
    + '<cellStyles count="1"><cellStyle name="Normal" xfId="0" builtinId="0"/></cellStyles></styleSheet>';
}

/**
 * The index of a cell style that equals style `base` but for its number format: an existing one, else one appended to
 * `cellXfs`. Nothing in the part moves, so every other index stays right.
 */
export function styleWithFormat(text: string, part: string, base: number, format: string): { text: string; style: number } {
  const root = parseXml(text, part);
  const cellXfs = childOf(root, 'cellXfs');
  const xfs = childrenOf(cellXfs, 'xf');
  const splices = [];
  const formats = childOf(root, 'numFmts');
  const custom = childrenOf(formats, 'numFmt');
  const known = custom.find((item) => decodeXstring(attribute(item, 'formatCode') ?? '') === format);
  let id = builtInId(format) ?? (known ? Number(attribute(known, 'numFmtId')) : undefined);
  if (id === undefined) {
    id = Math.max(163, ...custom.map((item) => Number(attribute(item, 'numFmtId')))) + 1; // ids below 164 are reserved
    const numFmt = `<${prefixOf(root)}numFmt numFmtId="${id}" formatCode="${escapeXml(encodeXstringAttribute(format))}"/>`;
    if (formats) splices.push(...appendInside(text, formats, numFmt, { count: String(custom.length + 1) }));
    else {
      // numFmts is the first child of styleSheet
      const list = `<${prefixOf(root)}numFmts count="1">${numFmt}</${prefixOf(root)}numFmts>`;
      splices.push({ start: root.openEnd, end: root.openEnd, text: list });
    }
  }
  const source = xfs[base] ?? xfs[0];
  const changes = { numFmtId: String(id), applyNumberFormat: '1' };
  const xf = source === undefined
    ? `<${prefixOf(root)}xf numFmtId="${id}" fontId="0" fillId="0" borderId="0" xfId="0" applyNumberFormat="1"/>`
    : withAttributes(text.slice(source.start, source.openEnd), changes) + text.slice(source.openEnd, source.end);
  const same = xfs.findIndex((item) => text.slice(item.start, item.end) === xf);
  if (same >= 0) return { text: applySplices(text, splices), style: same };
  if (!cellXfs) return styleWithFormat(withCellXfs(text, root), part, base, format);
  splices.push(...appendInside(text, cellXfs, xf, { count: String(xfs.length + 1) }));
  return { text: applySplices(text, splices), style: xfs.length };
}

/** A style part without cell styles (seldom seen) gets its default one in the place the schema wants it. */
function withCellXfs(text: string, root: XmlElement): string {
  const before = ['numFmts', 'fonts', 'fills', 'borders', 'cellStyleXfs'];
  const p = prefixOf(root);
  const list = `<${p}cellXfs count="1"><${p}xf numFmtId="0" fontId="0" fillId="0" borderId="0"/></${p}cellXfs>`;
  const last = root.children.filter((child) => before.includes(child.tag.local)).at(-1);
  if (!last) return applySplices(text, appendInside(text, root, list));
  return applySplices(text, [{ start: last.end, end: last.end, text: list }]);
}
