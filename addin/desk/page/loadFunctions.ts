import type { FunctionBundle } from '../sheet/Desk';
import { customFunctions } from '../sheet/functionHost';
import type { FunctionBody, FunctionHostOptions } from '../sheet/functionHost';

/** Loads the built functions as Excel does: the host's objects first, then the script. Nothing is evaluated from text. */
export async function loadFunctions(): Promise<FunctionBundle> {
  const bodies = new Map<string, FunctionBody>();
  let port: FunctionHostOptions['port'];
  Object.assign(globalThis, {
    CustomFunctions: customFunctions(bodies),
    RootsumPort: () => (typeof port === 'function' ? port() : port),
    RootsumHost: { decimalSeparator: '.' },
  });
  const [metadata] = await Promise.all([fetch('functions.json').then((response) => response.text()), scriptLoaded('functions.js')]);
  return { metadata, loaded: { bodies, usePort: (given) => { port = given; } } };
}

function scriptLoaded(src: string): Promise<void> {
  return new Promise((resolve, reject) => {
    const script = document.createElement('script');
    script.src = src;
    script.onload = () => resolve();
    script.onerror = () => reject(new Error(`${src} could not be loaded`));
    document.head.append(script);
  });
}
