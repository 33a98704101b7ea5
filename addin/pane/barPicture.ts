/** Shares of the variance as bars; the picture has its numbers as text, and a label for those who do not see it. */
export function barPicture(sources: readonly { readonly label: string; readonly share: number }[]): SVGElement {
  const NS = 'http://www.w3.org/2000/svg';
  const make = (tag: string, attributes: Record<string, string | number>, text?: string): SVGElement => {
    const element = document.createElementNS(NS, tag) as SVGElement;
    for (const [name, value] of Object.entries(attributes)) element.setAttribute(name, String(value));
    if (text !== undefined) element.textContent = text;
    return element;
  };
  const shown = sources.slice(0, 8);
  const rest = sources.slice(8).reduce((sum, s) => sum + s.share, 0);
  const bars = rest > 0 ? [...shown, { label: `${sources.length - 8} more`, share: rest }] : shown;
  const height = bars.length * 34 + 4;
  const words = bars.map(({ label, share }) => `${label} ${(share * 100).toFixed(1)} %`).join(', ');
  const svg = make('svg', { viewBox: `0 0 300 ${height}`, role: 'img', 'aria-label': `Shares of the variance: ${words}`, class: 'bars' });
  bars.forEach(({ label, share }, i) => {
    const y = i * 34 + 2;
    svg.append(
      make('text', { x: 0, y: y + 11, class: 'label' }, label.length > 34 ? `${label.slice(0, 33)}…` : label),
      make('text', { x: 300, y: y + 11, 'text-anchor': 'end', class: 'label' }, `${(share * 100).toFixed(1)} %`),
      make('rect', { x: 0, y: y + 15, width: 300, height: 11, class: 'track' }),
      make('rect', { x: 0, y: y + 15, width: Math.max(1, Math.min(1, share) * 300), height: 11, class: 'bar' }),
    );
  });
  return svg;
}
