import { icon, outlineIcon } from './icons';
import { jsonManifest } from './jsonManifest';
import { files, manifestSource } from './source';
import { xmlManifest } from './xmlManifest';

/** Sizes that the manifests or the catalogues of add-ins ask for. */
export const iconSizes = [16, 32, 64, 80, 128, 192] as const;

/**
 * Every file that belongs to the manifests, by its name below the folder of what is built. The same host gives the same bytes.
 *
 * @throws   EngineError "domain" if the host is no https address.
 */
export function manifestFiles(host?: string): ReadonlyMap<string, string | Uint8Array> {
  const source = manifestSource(host);
  return new Map<string, string | Uint8Array>([
    ['manifest.xml', xmlManifest(source)],
    ['manifest.json', `${JSON.stringify(jsonManifest(source), null, 2)}\n`],
    ...iconSizes.map((size) => [files.icon(size), icon(size)] as const),
    [files.icon('outline'), outlineIcon(32)],
  ]);
}
