import { EngineError } from '../functions/engine/EngineError';

/**
 * The address below which the add-in's files are served, without slashes at its end. It may have a port and a path.
 *
 * @throws    EngineError "domain" unless it is an https address with a host and with no user, query or fragment: Excel loads an add-in
 *            over https only, and file names are put behind the address.
 * @example   hostAddress('https://lab.example/rootsum/') // 'https://lab.example/rootsum'
 */
export function hostAddress(text: string): string {
  const refuse = (need: string): never => {
    throw new EngineError('domain', `ROOTSUM_HOST needs ${need}, got ${JSON.stringify(text)}`);
  };
  if (!/^https:\/\/[^/\\\s?#]/i.test(text) || !URL.canParse(text)) return refuse('an https address with a host');
  const { origin, pathname, search, hash, username, password } = new URL(text);
  if (username || password || search || hash || /[?#]/.test(text)) return refuse('an address without user, query and fragment');
  return `${origin}${pathname.replace(/\/+$/, '')}`;
}
