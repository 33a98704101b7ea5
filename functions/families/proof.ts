import { whole } from '../declaration';
import { build, version } from '../version';

export const proofFunctions = [
  whole({
    name: 'LIBRARY_VERSION',
    family: 'Proof',
    help: 'Version and build of the library, for the record.',
    parameters: {},
    result: 'version, build',
    body: () => [[version, build]],
  }),
];
