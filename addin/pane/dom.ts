/** Attributes and properties of an element: `on…` are listeners, booleans set or leave out an attribute. */
export type Attributes = Readonly<Record<string, string | number | boolean | ((event: never) => void) | undefined>>;

/** An element with its attributes and children; texts become text nodes, never markup. */
export function h<K extends keyof HTMLElementTagNameMap>(tag: K, attributes: Attributes = {}, ...children: readonly (Node | string | undefined)[]): HTMLElementTagNameMap[K] {
  const element = document.createElement(tag);
  for (const [name, value] of Object.entries(attributes)) {
    if (value === undefined || value === false) continue;
    if (typeof value === 'function') element.addEventListener(name.slice(2), value as EventListener);
    else element.setAttribute(name, value === true ? '' : String(value));
  }
  element.append(...children.filter((c) => c !== undefined));
  return element;
}

/** Replaces all children. */
export const fill = (element: Element, ...children: readonly (Node | string)[]): void => element.replaceChildren(...children);
