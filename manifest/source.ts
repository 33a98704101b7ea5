import { readFileSync } from 'node:fs';
import { namespace } from '../functions/names';
import { hostAddress } from './hostAddress';
import { manifestVersion } from './manifestVersion';

/** Where the add-in is served if nothing else is said: the developer's own machine. */
const defaultHost = 'https://localhost:3000';

/** Files that the manifests point to, by their names below the host address. */
export const files = {
  /** The one page of the shared runtime: custom functions, ribbon commands and the task pane live in it. */
  page: 'taskpane.html',
  script: 'functions.js',
  metadata: 'functions.json',
  /** Support, privacy and terms of use: the unified manifest demands an address for each of them. */
  about: 'about.html',
  icon: (name: number | string) => `icons/rootsum-${name}.png`,
} as const;

/** Icons of the ribbon. Three sizes are required. */
export const ribbonIconSizes = [16, 32, 80] as const;

/** What both manifests are written from. */
export interface ManifestSource {
  readonly id: string;
  /** Four numbers, the last of them 0. */
  readonly version: string;
  readonly provider: string;
  readonly name: string;
  readonly fullName: string;
  /** At most 80 characters. */
  readonly shortDescription: string;
  /** At most 250 characters. */
  readonly description: string;
  readonly language: string;
  readonly accentColor: string;
  readonly namespace: string;
  readonly requirementSets: readonly { readonly name: string; readonly minVersion: string }[];
  readonly ribbon: Ribbon;
  /** The host address, without a slash at its end. */
  readonly host: string;
  /** The full address of a file below the host address. */
  readonly url: (file: string) => string;
}

/** A button that runs a function of the page, by the name under which the page associates it. */
export interface RibbonCommand {
  readonly controlId: string;
  readonly action: string;
  readonly label: string;
  readonly tipTitle: string;
  readonly tip: string;
}

/** A group of commands in a tab of Excel's own. */
export interface Ribbon {
  readonly commands: readonly RibbonCommand[];
  readonly tab: string;
  readonly group: { readonly id: string; readonly label: string };
  readonly pane: { readonly controlId: string; readonly paneId: string; readonly label: string; readonly tipTitle: string; readonly tip: string };
}

/** Ids by which the XML manifest refers to its resources: unique, at most 32 characters. */
export const resourceIds = {
  page: 'Rootsum.Page',
  script: 'Rootsum.Script',
  metadata: 'Rootsum.Metadata',
  namespace: 'Rootsum.Namespace',
  groupLabel: 'Rootsum.Group.Label',
  paneLabel: 'Rootsum.Pane.Label',
  paneTipTitle: 'Rootsum.Pane.TipTitle',
  paneTip: 'Rootsum.Pane.Tip',
  icon: (size: number) => `Rootsum.Icon.${size}`,
  /** Of a command, by its place: label, title and text of its tip. */
  command: (i: number, part: 'Label' | 'TipTitle' | 'Tip') => `Rootsum.Command${i}.${part}`,
} as const;

/**
 * The source of the manifests for an add-in that is served at `host`.
 *
 * Required are a shared runtime, since functions read the workbook, and version 1.3 of the functions' runtime, since they need the
 * addresses of their arguments. Data types (version 1.4) are asked for at run time, not here.
 *
 * @throws   EngineError "domain" if the host is no https address.
 */
export function manifestSource(host: string = defaultHost): ManifestSource {
  const address = hostAddress(host);
  return {
    id: 'b2646f2e-1192-49b2-b5c4-0109bad87fc1', // never to be changed: a host knows the add-in by it
    version: manifestVersion(packageVersion()),
    provider: 'The Rootsum maintainers',
    name: 'Rootsum',
    fullName: 'Rootsum: measurement uncertainty through the formulas of a workbook',
    shortDescription: "Carries measurement uncertainty through the formulas of a laboratory's workbook",
    description:
      "Worksheet functions that carry measurement uncertainty through the formulas of a laboratory's workbook. An aid only: the laboratory "
      + 'validates it for its own use, and the applicable standards, local codes and licensed practice come first.',
    language: 'en-US',
    accentColor: '#15505C',
    namespace,
    requirementSets: [
      { name: 'SharedRuntime', minVersion: '1.1' },
      { name: 'CustomFunctionsRuntime', minVersion: '1.3' },
    ],
    ribbon: {
      tab: 'TabFormulas',
      group: { id: 'Rootsum.Group', label: 'Rootsum' },
      commands: [
        {
          controlId: 'Rootsum.TakeBack', action: 'rootsumTakeBack', label: 'Take back', tipTitle: 'Take back',
          tip: 'Takes back what the pane wrote last, all cells of the step at once.',
        },
        {
          controlId: 'Rootsum.Functions', action: 'rootsumReference', label: 'Functions', tipTitle: 'Reference of the functions',
          tip: 'Opens the reference of all worksheet functions: purpose, arguments, example, formula, source and cautions.',
        },
      ],
      pane: {
        controlId: 'Rootsum.ShowPane',
        paneId: 'Rootsum.Pane',
        label: 'Carry',
        tipTitle: 'Carry uncertainty',
        tip: 'Opens the pane that writes uncertainty columns beside your results. What it writes must be validated by the laboratory before use.',
      },
    },
    host: address,
    url: (file) => `${address}/${file}`,
  };
}

const packageVersion = (): string => JSON.parse(readFileSync(new URL('../package.json', import.meta.url), 'utf8')).version;
