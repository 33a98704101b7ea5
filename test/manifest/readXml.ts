import { SaxesParser } from 'saxes';

export interface Node {
  readonly name: string;
  readonly attributes: Readonly<Record<string, string>>;
  readonly children: Node[];
  text: string;
}

/** Reads a document; throws where it is not well formed or a prefix is not declared. */
export function readXml(text: string): Node {
  const parser = new SaxesParser({ xmlns: true });
  const open: Node[] = [{ name: '', attributes: {}, children: [], text: '' }];
  parser.on('error', (error) => {
    throw error;
  });
  parser.on('opentag', ({ name, attributes }) => {
    const values = Object.fromEntries(Object.entries(attributes).map(([key, { value }]) => [key, value]));
    const node: Node = { name, attributes: values, children: [], text: '' };
    open[open.length - 1].children.push(node);
    open.push(node);
  });
  parser.on('text', (piece) => {
    open[open.length - 1].text += piece.trim(); // texts here have no blanks at their ends; the rest is indentation
  });
  parser.on('closetag', () => {
    open.pop();
  });
  parser.write(text).close();
  return open[0].children[0];
}

/** Every element of a tree, the root first. */
export const everyNode = (node: Node): Node[] => [node, ...node.children.flatMap(everyNode)];

/** Elements by name, and by their `xsi:type` if one is given. */
export const named = (node: Node, name: string, type?: string): Node[] =>
  everyNode(node).filter((found) => found.name === name && (type === undefined || found.attributes['xsi:type'] === type));

/** The one element of that name. */
export function only(node: Node, name: string, type?: string): Node {
  const found = named(node, name, type);
  if (found.length !== 1) throw new Error(`${found.length} elements ${name} in ${node.name}`);
  return found[0];
}
