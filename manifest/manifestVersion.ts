import { EngineError } from '../functions/engine/EngineError';

/**
 * The version of the manifests, from that of the package: the first number raised by one, and a fourth number 0.
 * Manifests below 1.0 are refused ("Manifest Version Too Low") and a manifest must never go back, so a package at 0.x needs a shift,
 * and the shift must stay for good. Excel on the web wants four numbers.
 *
 * @throws    EngineError "domain" if the version is not three plain numbers of at most five digits.
 * @source    Microsoft's documentation of the Version element; the lower limit from reports of the manifest validator's messages.
 * @example   manifestVersion('0.1.0') // '1.1.0.0'
 */
export function manifestVersion(version: string): string {
  const parts = /^(\d{1,4})\.(\d{1,5})\.(\d{1,5})$/.exec(version);
  if (!parts) throw new EngineError('domain', `manifestVersion needs a version of three numbers, got ${JSON.stringify(version)}`);
  const [major, minor, patch] = parts.slice(1).map(Number);
  return `${major + 1}.${minor}.${patch}.0`;
}
