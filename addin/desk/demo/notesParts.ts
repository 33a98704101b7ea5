import { element, textElement, xmlPart } from './xml';

export interface Note { address: string; column: number; row: number; text: string }

/** The texts of the notes of a sheet (the older kind of comment). */
export function notesPart(notes: readonly Note[]): string {
  const look = element('rPr', {}, element('sz', { val: 9 }) + element('color', { indexed: 81 }) + element('rFont', { val: 'Tahoma' }) + element('family', { val: 2 }));
  return xmlPart(element('comments', { xmlns: 'http://schemas.openxmlformats.org/spreadsheetml/2006/main' },
    element('authors', {}, textElement('author', 'Demonstration laboratory'))
    + element('commentList', {}, notes.map((note) => element('comment', { ref: note.address, authorId: 0 },
      element('text', {}, element('r', {}, look + textElement('t', note.text))))).join(''))));
}

/** The boxes of the notes, in the drawing language that older worksheets use for them. */
export function noteBoxesPart(notes: readonly Note[]): string {
  const shapeType = element('v:shapetype', { id: '_x0000_t202', coordsize: '21600,21600', 'o:spt': 202, path: 'm,l,21600r21600,l21600,xe' },
    element('v:stroke', { joinstyle: 'miter' }) + element('v:path', { gradientshapeok: 't', 'o:connecttype': 'rect' }));
  const boxes = notes.map((note, i) => element('v:shape', {
    id: `_x0000_s${1025 + i}`, type: '#_x0000_t202', fillcolor: '#ffffe1', 'o:insetmode': 'auto',
    style: 'position:absolute;margin-left:60pt;margin-top:2pt;width:190pt;height:62pt;z-index:1;visibility:hidden',
  }, [
    element('v:fill', { color2: '#ffffe1' }),
    element('v:shadow', { on: 't', color: 'black', obscured: 't' }),
    element('v:path', { 'o:connecttype': 'none' }),
    element('v:textbox', { style: 'mso-direction-alt:auto' }, element('div', { style: 'text-align:left' })),
    element('x:ClientData', { ObjectType: 'Note' }, [
      element('x:MoveWithCells'),
      element('x:SizeWithCells'),
      // Left column, offset, top row, offset, right column, offset, bottom row, offset; zero-based, offsets in pixels.
      element('x:Anchor', {}, `${note.column + 1}, 12, ${Math.max(note.row - 1, 0)}, 6, ${note.column + 4}, 20, ${note.row + 4}, 2`),
      element('x:AutoFill', {}, 'False'),
      element('x:Row', {}, String(note.row)),
      element('x:Column', {}, String(note.column)),
    ].join('')),
  ].join('')));
  return element('xml', {
    'xmlns:v': 'urn:schemas-microsoft-com:vml', 'xmlns:o': 'urn:schemas-microsoft-com:office:office', 'xmlns:x': 'urn:schemas-microsoft-com:office:excel',
  }, element('o:shapelayout', { 'v:ext': 'edit' }, element('o:idmap', { 'v:ext': 'edit', data: 1 })) + shapeType + boxes.join(''));
}
