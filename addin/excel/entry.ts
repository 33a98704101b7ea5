/// <reference types="office-js" />
import { connect } from './connect';

/*
 * What the page of the shared runtime runs, before the functions: it gives them their port, and opens the pane where the page shows one.
 * Outside of a host it does nothing.
 */
void connect(globalThis, () => import('../pane/mountPane'));
