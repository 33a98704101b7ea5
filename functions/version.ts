// Put in place by the build; absent where the sources run unbundled.
declare const ROOTSUM_VERSION: string | undefined;
declare const ROOTSUM_BUILD: string | undefined;

/** Version of the package: `0.1.0`, or `development` where the sources run unbundled. */
export const version: string = typeof ROOTSUM_VERSION === 'string' ? ROOTSUM_VERSION : 'development';

/** Version and a hash of the bundle's own text: `0.1.0+1a2b3c4d`; the same sources give the same build. */
export const build: string = typeof ROOTSUM_BUILD === 'string' ? ROOTSUM_BUILD : 'development';
