import { mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { OfficeAddinManifest, validateManifest } from 'office-addin-manifest';
import { afterAll, beforeAll, beforeEach, describe, expect, test, vi } from 'vitest';
import { functionsMetadata } from '../../functions/metadata';
import { registry } from '../../functions/registry';
import { jsonManifest } from '../../manifest/jsonManifest';
import { manifestFiles } from '../../manifest/manifestFiles';
import { manifestSource } from '../../manifest/source';
import { xmlManifest } from '../../manifest/xmlManifest';
import { everyNode, only, readXml } from './readXml';

interface Unified {
  $schema: string;
  manifestVersion: string;
  version: string;
  id: string;
  name: { short: string };
  description: { short: string; full: string };
  icons: { outline: string; color: string };
  validDomains: string[];
  extensions: [Extension];
}
interface Extension {
  requirements: { capabilities: { name: string; minVersion: string }[] };
  runtimes: [Runtime];
  ribbons: [{ tabs: [{ builtInTabId: string; groups: [Group] }] }];
}

interface Runtime {
  code: { page: string; script: string };
  lifetime: string;
  actions: { id: string; type: string; view: string }[];
  customFunctions: object;
}
interface Group {
  label: string;
  icons: { size: number; url: string }[];
  controls: [{ label: string; actionId: string }];
}

const source = manifestSource();
const made = (): Unified => structuredClone(jsonManifest(source)) as Unified;

let folder: string;
let path: string;
const problems = async (manifest: unknown): Promise<string[]> => {
  writeFileSync(path, JSON.stringify(manifest));
  const { isValid, report } = await validateManifest(path);
  const found = (report?.errors ?? []).map(({ content }) => content ?? '');
  expect(isValid).toBe(found.length === 0);
  return found;
};

beforeAll(() => {
  folder = mkdtempSync(join(tmpdir(), 'rootsum-manifest-'));
  path = join(folder, 'manifest.json');
});
afterAll(() => rmSync(folder, { recursive: true }));
// The schemas come with the package; whatever is not there must not be fetched.
beforeEach(() => {
  vi.stubGlobal('fetch', () => {
    throw new Error('a test may not use the network');
  });
  return () => vi.unstubAllGlobals();
});

describe('the published schema', () => {
  test('finds nothing wrong', async () => {
    expect(await problems(made())).toEqual([]);
  });
  test('finds what is wrong', async () => {
    const long = made();
    long.description.short = 'x'.repeat(81);
    expect((await problems(long)).join()).toContain('/description/short');
    const dashed = made();
    Object.assign(dashed.extensions[0].runtimes[0].customFunctions, { namespace: { id: 'ROOT-SUM', name: 'ROOTSUM' } });
    expect((await problems(dashed)).join()).toContain('/customFunctions/namespace/id');
  });
  test('finds nothing wrong with the functions themselves', async () => {
    // Listed in a manifest of version 1.27, the first that allows a function 1024 characters of help and an argument 512.
    const listed = made();
    listed.$schema = listed.$schema.replace('v1.25', 'v1.27');
    listed.manifestVersion = '1.27';
    const functions = functionsMetadata(registry).functions.map(({ options, ...given }) => ({
      ...given,
      ...(options?.requiresAddress && { requiresAddress: true }),
      ...(options?.requiresParameterAddresses && { requiresParameterAddress: true }),
    }));
    Object.assign(listed.extensions[0].runtimes[0].customFunctions, { functions });
    expect(await problems(listed)).toEqual([]);
    Object.assign(listed.extensions[0].runtimes[0].customFunctions, { functions: [{ ...functions[0], name: 'A-B' }] });
    expect((await problems(listed)).join()).toContain('/customFunctions/functions/0/name');
  });
});

describe('the unified manifest', () => {
  const unified = made();
  const [{ requirements, runtimes: [runtime], ribbons: [{ tabs: [tab] }] }] = unified.extensions;
  const [group] = tab.groups;
  const xml = readXml(xmlManifest(source));
  const resource = (resid: string) => everyNode(xml).find(({ attributes }) => attributes.id === resid)?.attributes.DefaultValue;

  test('says the same as the XML manifest', () => {
    expect(unified.id).toBe(only(xml, 'Id').text);
    expect(`${unified.version}.0`).toBe(only(xml, 'Version').text);
    expect(unified.name.short).toBe(only(xml, 'DisplayName').attributes.DefaultValue);
    expect(unified.description.full).toBe(xml.children.find(({ name }) => name === 'Description')?.attributes.DefaultValue);
    const sets = only(xml, 'Sets').children.map(({ attributes: { Name, MinVersion } }) => ({ name: Name, minVersion: MinVersion }));
    expect(requirements.capabilities).toEqual(sets);
    expect(tab.builtInTabId).toBe(only(xml, 'OfficeTab').attributes.id);
    expect(runtime.code.page).toBe(resource(only(xml, 'Runtime').attributes.resid));
    expect(runtime.code.script).toBe(resource(only(only(xml, 'Script'), 'SourceLocation').attributes.resid));
    expect(runtime.lifetime).toBe(only(xml, 'Runtime').attributes.lifetime);
    expect(group.label).toBe(resource(only(xml, 'Group').children[0].attributes.resid));
    const controls = everyNode(xml).filter(({ name }) => name === 'Control');
    expect(group.controls.map(({ label }) => label)).toEqual(controls.map(({ children }) => resource(children[0].attributes.resid)));
    expect(group.controls.length).toBe(3);
  });
  test('puts the functions into the shared runtime, by the address of their metadata', () => {
    // "Configure custom functions with the unified manifest for Microsoft 365".
    expect(runtime.customFunctions).toEqual({
      namespace: { id: 'ROOTSUM', name: 'ROOTSUM' },
      allowCustomDataForDataTypeAny: true,
      metadataUrl: 'https://localhost:3000/functions.json',
    });
  });
  test('has an action for every control, and opens the pane in the same runtime', () => {
    for (const { actionId } of group.controls) expect(runtime.actions.map(({ id }) => id)).toContain(actionId);
    const functions = everyNode(xml).filter(({ name }) => name === 'FunctionName').map(({ text }) => ({ id: text, type: 'executeFunction' }));
    expect(runtime.actions).toEqual([{ id: group.controls[0].actionId, type: 'openPage', view: only(xml, 'TaskpaneId').text }, ...functions]);
  });
  test('names icons that are written', () => {
    const written = [...manifestFiles().keys()];
    for (const { url } of group.icons) expect(written.map((name) => `https://localhost:3000/${name}`)).toContain(url);
    expect(group.icons.map(({ size }) => size)).toEqual([16, 32, 80]); // "Three image sizes are required", says the schema
    for (const name of Object.values(unified.icons)) expect(written).toContain(name);
  });
});

test('office-addin-manifest reads and modifies it', async () => {
  writeFileSync(path, JSON.stringify(made()));
  expect(await OfficeAddinManifest.readManifestFile(path)).toMatchObject({
    id: source.id, displayName: 'Rootsum', hosts: ['workbook'], permissions: 'Document.ReadWrite.User', version: source.version.slice(0, -2),
  });
  const id = '0d9a5c4e-5a39-4b8f-9d3c-8f2f1f6c7e11';
  await OfficeAddinManifest.modifyManifestFile(path, id, 'Rootsum trial');
  // Members that the schema does not know would be lost on the way, before they could be found wrong: nothing is.
  expect(JSON.parse(readFileSync(path, 'utf8'))).toEqual({ ...made(), id, name: { ...made().name, short: 'Rootsum trial' } });
});
