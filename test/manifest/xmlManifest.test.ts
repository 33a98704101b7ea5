import { mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { OfficeAddinManifest } from 'office-addin-manifest';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { manifestFiles } from '../../manifest/manifestFiles';
import { files, manifestSource } from '../../manifest/source';
import { xmlManifest } from '../../manifest/xmlManifest';
import { everyNode, named, only, readXml } from './readXml';
import type { Node } from './readXml';

// The service that validates XML manifests cannot be asked offline; these are its published rules, each under the title of its page in
// Microsoft's documentation.

/** "How to find the proper order of manifest elements", task pane add-ins; parents with their children in order. */
const order: Readonly<Record<string, readonly string[]>> = {
  OfficeApp: [
    'Id', 'AlternateId', 'Version', 'ProviderName', 'DefaultLocale', 'DisplayName', 'Description', 'IconUrl', 'HighResolutionIconUrl',
    'SupportUrl', 'AppDomains', 'Hosts', 'Requirements', 'DefaultSettings', 'Permissions', 'Dictionary', 'VersionOverrides',
    'ExtendedOverrides',
  ],
  Requirements: ['Sets', 'Methods'],
  Sets: ['Set'],
  DefaultSettings: ['SourceLocation'],
  VersionOverrides: ['Description', 'Requirements', 'Hosts', 'Resources', 'WebApplicationInfo', 'EquivalentAddins'],
  Hosts: ['Host'],
  Host: ['Runtimes', 'AllFormFactors', 'DesktopFormFactor'],
  Runtimes: ['Runtime'],
  AllFormFactors: ['ExtensionPoint'],
  DesktopFormFactor: ['GetStarted', 'FunctionFile', 'ExtensionPoint'],
  'ExtensionPoint CustomFunctions': ['Script', 'Page', 'Metadata', 'Namespace'],
  'ExtensionPoint PrimaryCommandSurface': ['OfficeTab', 'CustomTab'],
  Script: ['SourceLocation'],
  Page: ['SourceLocation'],
  Metadata: ['SourceLocation'],
  OfficeTab: ['Group'],
  Group: ['OverriddenByRibbonApi', 'Label', 'Icon', 'Control'],
  Control: ['OverriddenByRibbonApi', 'Label', 'Supertip', 'Icon', 'Action', 'Enabled'],
  Supertip: ['Title', 'Description'],
  Icon: ['bt:Image'],
  Action: ['TaskpaneId', 'SourceLocation', 'Title', 'FunctionName'],
  Resources: ['bt:Images', 'bt:Urls', 'bt:ShortStrings', 'bt:LongStrings'],
  'bt:Images': ['bt:Image'],
  'bt:Urls': ['bt:Url'],
  'bt:ShortStrings': ['bt:String'],
  'bt:LongStrings': ['bt:String'],
};

const source = manifestSource();
const text = xmlManifest(source);
const manifest = readXml(text);
const overrides = only(manifest, 'VersionOverrides');
const resources = only(overrides, 'Resources');

/** What an id of a resource stands for. */
const resource = (resid: string): string => {
  const found = everyNode(resources).filter(({ attributes }) => attributes.id === resid);
  expect(found, resid).toHaveLength(1);
  return found[0].attributes.DefaultValue;
};

/** Children that stand under the wrong parent or in the wrong order. */
function misplaced(root: Node): string[] {
  return everyNode(root).flatMap((parent) => {
    if (parent.children.length === 0) return [];
    const allowed = order[parent.name] ?? order[`${parent.name} ${parent.attributes['xsi:type']}`];
    if (!allowed) return [`${parent.name} may have no children`];
    const places = parent.children.map(({ name }) => allowed.indexOf(name));
    return parent.children.filter((_, i) => places[i] < 0 || (i > 0 && places[i] < places[i - 1])).map(({ name }) => `${name} in ${parent.name}`);
  });
}

describe('structure', () => {
  test('is that of a task pane add-in with version 1.0 of the overrides', () => {
    // "VersionOverrides element": TaskPaneApp supports version 1.0 only, under this namespace.
    const attributes = { 'xsi:type': 'TaskPaneApp', xmlns: 'http://schemas.microsoft.com/office/appforoffice/1.1' };
    expect(manifest).toMatchObject({ name: 'OfficeApp', attributes });
    expect(overrides.attributes).toEqual({
      xmlns: 'http://schemas.microsoft.com/office/taskpaneappversionoverrides', 'xsi:type': 'VersionOverridesV1_0',
    });
  });
  test('has every element under its parent and in order', () => {
    expect(misplaced(manifest)).toEqual([]);
  });
  test('and the check of the order sees an element out of place', () => {
    const swapped = readXml(text.replace(/( *<Runtimes>[\s\S]*<\/Runtimes>\n)( *<AllFormFactors>[\s\S]*<\/AllFormFactors>\n)/, '$2$1'));
    expect(misplaced(swapped)).toEqual(['Runtimes in Host']);
  });
  test('keeps signs that XML has a use for', () => {
    const name = 'A & B <"c"> &amp; d';
    expect(only(readXml(xmlManifest({ ...source, name, provider: name })), 'DisplayName').attributes.DefaultValue).toBe(name);
    expect(only(readXml(xmlManifest({ ...source, name, provider: name })), 'ProviderName').text).toBe(name);
  });
  test('has what must be there', () => {
    // "Office Add-ins with the add-in only manifest": elements required of task pane add-ins.
    for (const name of ['Id', 'Version', 'ProviderName', 'DefaultLocale', 'DisplayName', 'Description', 'Permissions', 'DefaultSettings'])
      expect(manifest.children.map((child) => child.name), name).toContain(name);
    expect(only(manifest, 'Id').text).toMatch(/^[0-9a-f]{8}(-[0-9a-f]{4}){3}-[0-9a-f]{12}$/);
  });
  test('has a version of four numbers, 1.0 or later', () => {
    // "Version element"; Excel on the web takes four numbers only (reported to the makers of office-addin-manifest).
    expect(only(manifest, 'Version').text).toMatch(/^[1-9]\d{0,4}(\.\d{1,5}){3}$/);
  });
  test('asks for a workbook, a shared runtime and the runtime of the functions', () => {
    // "Shared runtime requirement sets"; "Custom Functions requirement sets".
    expect(named(manifest, 'Host').map(({ attributes }) => attributes)).toEqual([{ Name: 'Workbook' }, { 'xsi:type': 'Workbook' }]);
    expect(named(manifest, 'Set').map(({ attributes }) => attributes)).toEqual([
      { Name: 'SharedRuntime', MinVersion: '1.1' },
      { Name: 'CustomFunctionsRuntime', MinVersion: '1.3' },
    ]);
    expect(only(manifest, 'Permissions').text).toBe('ReadWriteDocument'); // one of the words of "Permissions element"
  });
  test('says that it is an aid which the laboratory validates', () => {
    const description = manifest.children.find(({ name }) => name === 'Description');
    expect(description?.attributes.DefaultValue).toMatch(/\baid\b.*\bvalidates\b/);
  });
});

describe('lengths', () => {
  test('of the base part are within bounds', () => {
    // "DisplayName element": 125; "Description element": 250; "ProviderName element": 125.
    const base = (name: string) => manifest.children.find((child) => child.name === name);
    expect(base('DisplayName')?.attributes.DefaultValue.length).toBeLessThanOrEqual(125);
    expect(base('Description')?.attributes.DefaultValue.length).toBeLessThanOrEqual(250);
    expect(base('ProviderName')?.text.length).toBeLessThanOrEqual(125);
  });
  test('of resources are within bounds', () => {
    // "Resources element": an id has at most 32 characters, a URL 2048, a short string 125, a long string 250.
    for (const [kind, most] of [['bt:Images', 2048], ['bt:Urls', 2048], ['bt:ShortStrings', 125], ['bt:LongStrings', 250]] as const)
      for (const { attributes } of only(resources, kind).children) {
        expect(attributes.id.length, attributes.id).toBeLessThanOrEqual(32);
        expect(attributes.DefaultValue.length, attributes.id).toBeGreaterThan(0);
        expect(attributes.DefaultValue.length, attributes.id).toBeLessThanOrEqual(most);
      }
  });
  test('of ids of groups and controls are within bounds', () => {
    // "Group element" and "Control element": an id has at most 125 characters.
    for (const { attributes } of [...named(overrides, 'Group'), ...named(overrides, 'Control')])
      expect(attributes.id.length).toBeLessThanOrEqual(125);
  });
});

describe('references', () => {
  const used = everyNode(overrides).flatMap(({ attributes }) => attributes.resid ?? []);
  const defined = everyNode(resources).flatMap(({ attributes }) => attributes.id ?? []);
  test('are all defined, once, and none is unused', () => {
    // "Resources element": an id must be unique within the manifest.
    expect(new Set(defined).size).toBe(defined.length);
    expect([...new Set(used)].sort()).toEqual([...defined].sort());
  });
  test('of other ids are unique', () => {
    const ids = [...named(overrides, 'Group'), ...named(overrides, 'Control')].map(({ attributes }) => attributes.id);
    expect(new Set([...ids, ...defined]).size).toBe(ids.length + defined.length);
  });
  test('go to the kind of resource that the element takes', () => {
    const ids = (kind: string) => only(resources, kind).children.map(({ attributes }) => attributes.id);
    const [images, short, long] = ['bt:Images', 'bt:ShortStrings', 'bt:LongStrings'];
    const kinds: Record<string, string> = { 'bt:Image': images, Label: short, Title: short, Namespace: short, Description: long };
    for (const { name, attributes } of everyNode(overrides).filter(({ attributes }) => attributes.resid)) {
      const kind = kinds[name];
      expect(ids(kind ?? 'bt:Urls'), name).toContain(attributes.resid);
    }
  });
  test('name one runtime for functions, commands and pane, of long life', () => {
    // "Configure your Office Add-in to use a shared runtime".
    const runtime = only(overrides, 'Runtime').attributes;
    expect(runtime.lifetime).toBe('long');
    const [page, pane] = [only(overrides, 'Page'), only(overrides, 'Action', 'ShowTaskpane')].map((parent) => only(parent, 'SourceLocation'));
    const others = [page, only(overrides, 'FunctionFile'), pane];
    for (const { attributes } of others) expect(attributes.resid).toBe(runtime.resid);
    expect(resource(runtime.resid)).toBe(only(only(manifest, 'DefaultSettings'), 'SourceLocation').attributes.DefaultValue);
    expect(resource(runtime.resid)).toBe(`https://localhost:3000/${files.page}`);
  });
  test('name the files that the build writes', () => {
    // The names under which webpack.config.js emits the bundle and its metadata.
    expect(resource(only(only(overrides, 'Script'), 'SourceLocation').attributes.resid)).toBe('https://localhost:3000/functions.js');
    expect(resource(only(only(overrides, 'Metadata'), 'SourceLocation').attributes.resid)).toBe('https://localhost:3000/functions.json');
    expect(resource(only(overrides, 'Namespace').attributes.resid)).toBe('ROOTSUM');
  });
  test('name icons that are written, of the sizes they claim', () => {
    // "Icon element": 16, 32 and 80 are required; "IconUrl element": 32; "HighResolutionIconUrl element": 64.
    const written = [...manifestFiles().keys()].map((name) => `https://localhost:3000/${name}`);
    for (const icon of named(overrides, 'Icon')) {
      expect(icon.children.map(({ attributes }) => attributes.size)).toEqual(['16', '32', '80']);
      for (const { attributes } of icon.children) {
        expect(resource(attributes.resid)).toMatch(new RegExp(`-${attributes.size}\\.png$`));
        expect(written).toContain(resource(attributes.resid));
      }
    }
    for (const [name, size] of [['IconUrl', 32], ['HighResolutionIconUrl', 64]] as const) {
      const address = only(manifest, name).attributes.DefaultValue;
      expect(written).toContain(address);
      expect(address).toMatch(new RegExp(`-${size}\\.png$`));
    }
  });
  test('name a tab that Excel has on every platform', () => {
    // "Find the IDs of built-in Office ribbon tabs": Excel, supported on desktop and on the web.
    expect(['TabHome', 'TabInsert', 'TabPageLayoutExcel', 'TabFormulas', 'TabData', 'TabReview', 'TabView', 'TabDeveloper', 'TabAddIns'])
      .toContain(only(overrides, 'OfficeTab').attributes.id);
  });
});

describe('office-addin-manifest', () => {
  let folder: string;
  let path: string;
  beforeAll(() => {
    folder = mkdtempSync(join(tmpdir(), 'rootsum-manifest-'));
    path = join(folder, 'manifest.xml');
    writeFileSync(path, text);
  });
  afterAll(() => rmSync(folder, { recursive: true }));

  test('reads it', async () => {
    expect(await OfficeAddinManifest.readManifestFile(path)).toMatchObject({
      id: source.id, displayName: 'Rootsum', version: source.version, officeAppType: 'TaskPaneApp', hosts: ['Workbook'],
      permissions: 'ReadWriteDocument',
      providerName: source.provider, defaultLocale: 'en-US', description: source.description,
      iconUrl: 'https://localhost:3000/icons/rootsum-32.png', defaultSettings: { sourceLocation: 'https://localhost:3000/taskpane.html' },
    });
  });
  test('modifies it, and the rest stays as it was', async () => {
    const id = '0d9a5c4e-5a39-4b8f-9d3c-8f2f1f6c7e11';
    expect(await OfficeAddinManifest.modifyManifestFile(path, id, 'Rootsum & trial')).toMatchObject({ id, displayName: 'Rootsum & trial' });
    const modified = readXml(readFileSync(path, 'utf8'));
    expect(misplaced(modified)).toEqual([]);
    expect(only(modified, 'VersionOverrides')).toEqual(overrides);
  });
});
