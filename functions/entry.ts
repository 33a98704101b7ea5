import { callFunction } from './call';
import { functionsJson } from './metadata';
import { registry } from './registry';
import type { WorkbookPort } from './workbook';

/*
 * Entry of the functions bundle, which puts nothing on the global object. It knows its surroundings by free names:
 *     CustomFunctions   the host's registration point and error class
 *     RootsumPort       a WorkbookPort, or a function that gives one: how the workbook is read
 *     RootsumHost       settings of the user: { decimalSeparator }
 *     RootsumMetadata   takes the text of functions.json: how the build gets it from this very bundle
 * All but the first may be absent. Port and settings are looked up at each call, so that a host may set them after the bundle has loaded.
 */
declare const RootsumMetadata: ((json: string) => void) | undefined;
declare const RootsumPort: WorkbookPort | (() => WorkbookPort | undefined) | undefined;
declare const RootsumHost: { readonly decimalSeparator?: '.' | ',' } | undefined;

for (const declaration of registry)
  CustomFunctions.associate(declaration.name, (...args: unknown[]) => callFunction(declaration, args, { port: port(), decimalSeparator: separator() }));

if (typeof RootsumMetadata === 'function') RootsumMetadata(functionsJson(registry));

function port(): WorkbookPort | undefined {
  const given = typeof RootsumPort === 'undefined' ? undefined : RootsumPort;
  return typeof given === 'function' ? given() : given;
}

function separator(): '.' | ',' | undefined {
  return typeof RootsumHost === 'undefined' ? undefined : RootsumHost.decimalSeparator;
}
