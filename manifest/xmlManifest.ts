import { files, resourceIds, ribbonIconSizes } from './source';
import type { ManifestSource } from './source';
import { element, xmlDocument } from './xml';
import type { XmlElement } from './xml';

/**
 * The add-in-only manifest: the one with the widest reach (Windows, Mac, web, perpetual licences).
 * The order of elements matters to the host, and the runtime, the functions' page, the commands' file and the pane must name the same
 * resource, or each would get a runtime of its own.
 *
 * @source   Microsoft's documentation: "How to find the proper order of manifest elements"; "Configure your Office Add-in to use a shared
 *           runtime".
 */
export function xmlManifest(source: ManifestSource): string {
  const { url, requirementSets } = source;
  return xmlDocument(
    element(
      'OfficeApp',
      {
        xmlns: 'http://schemas.microsoft.com/office/appforoffice/1.1',
        'xmlns:xsi': 'http://www.w3.org/2001/XMLSchema-instance',
        'xmlns:bt': 'http://schemas.microsoft.com/office/officeappbasictypes/1.0',
        'xsi:type': 'TaskPaneApp',
      },
      [
        element('Id', {}, source.id),
        element('Version', {}, source.version),
        element('ProviderName', {}, source.provider),
        element('DefaultLocale', {}, source.language),
        value('DisplayName', source.name),
        value('Description', source.description),
        value('IconUrl', url(files.icon(32))),
        value('HighResolutionIconUrl', url(files.icon(64))),
        value('SupportUrl', url(files.about)),
        element('Hosts', {}, [element('Host', { Name: 'Workbook' })]),
        element('Requirements', {}, [
          element('Sets', {}, requirementSets.map(({ name, minVersion }) => element('Set', { Name: name, MinVersion: minVersion }))),
        ]),
        element('DefaultSettings', {}, [value('SourceLocation', url(files.page))]),
        // Reading would do for the functions; the pane writes formulas into the workbook.
        element('Permissions', {}, 'ReadWriteDocument'),
        versionOverrides(source),
      ],
    ),
  );
}

function versionOverrides(source: ManifestSource): XmlElement {
  return element(
    'VersionOverrides',
    { xmlns: 'http://schemas.microsoft.com/office/taskpaneappversionoverrides', 'xsi:type': 'VersionOverridesV1_0' },
    [
      element('Hosts', {}, [
        element('Host', { 'xsi:type': 'Workbook' }, [
          element('Runtimes', {}, [element('Runtime', { resid: resourceIds.page, lifetime: 'long' })]),
          element('AllFormFactors', {}, [customFunctions()]),
          element('DesktopFormFactor', {}, [element('FunctionFile', { resid: resourceIds.page }), commands(source)]),
        ]),
      ]),
      resources(source),
    ],
  );
}

const customFunctions = (): XmlElement =>
  element('ExtensionPoint', { 'xsi:type': 'CustomFunctions' }, [
    element('Script', {}, [reference('SourceLocation', resourceIds.script)]),
    element('Page', {}, [reference('SourceLocation', resourceIds.page)]),
    element('Metadata', {}, [reference('SourceLocation', resourceIds.metadata)]),
    reference('Namespace', resourceIds.namespace),
  ]);

const commands = ({ ribbon: { tab, group, pane, commands: others } }: ManifestSource): XmlElement =>
  element('ExtensionPoint', { 'xsi:type': 'PrimaryCommandSurface' }, [
    element('OfficeTab', { id: tab }, [
      element('Group', { id: group.id }, [
        reference('Label', resourceIds.groupLabel),
        icon(),
        element('Control', { 'xsi:type': 'Button', id: pane.controlId }, [
          reference('Label', resourceIds.paneLabel),
          element('Supertip', {}, [reference('Title', resourceIds.paneTipTitle), reference('Description', resourceIds.paneTip)]),
          icon(),
          element('Action', { 'xsi:type': 'ShowTaskpane' }, [
            element('TaskpaneId', {}, pane.paneId),
            reference('SourceLocation', resourceIds.page),
          ]),
        ]),
        ...others.map(({ controlId, action }, i) => element('Control', { 'xsi:type': 'Button', id: controlId }, [
          reference('Label', resourceIds.command(i, 'Label')),
          element('Supertip', {}, [reference('Title', resourceIds.command(i, 'TipTitle')), reference('Description', resourceIds.command(i, 'Tip'))]),
          icon(),
          element('Action', { 'xsi:type': 'ExecuteFunction' }, [element('FunctionName', {}, action)]),
        ])),
      ]),
    ]),
  ]);

const icon = (): XmlElement =>
  element('Icon', {}, ribbonIconSizes.map((size) => element('bt:Image', { size: `${size}`, resid: resourceIds.icon(size) })));

const resources = ({ url, namespace, ribbon: { group, pane, commands: others } }: ManifestSource): XmlElement =>
  element('Resources', {}, [
    element('bt:Images', {}, ribbonIconSizes.map((size) => resource('bt:Image', resourceIds.icon(size), url(files.icon(size))))),
    element('bt:Urls', {}, [
      resource('bt:Url', resourceIds.page, url(files.page)),
      resource('bt:Url', resourceIds.script, url(files.script)),
      resource('bt:Url', resourceIds.metadata, url(files.metadata)),
    ]),
    element('bt:ShortStrings', {}, [
      resource('bt:String', resourceIds.namespace, namespace),
      resource('bt:String', resourceIds.groupLabel, group.label),
      resource('bt:String', resourceIds.paneLabel, pane.label),
      resource('bt:String', resourceIds.paneTipTitle, pane.tipTitle),
      ...others.flatMap(({ label, tipTitle }, i) => [resource('bt:String', resourceIds.command(i, 'Label'), label), resource('bt:String', resourceIds.command(i, 'TipTitle'), tipTitle)]),
    ]),
    element('bt:LongStrings', {}, [
      resource('bt:String', resourceIds.paneTip, pane.tip),
      ...others.map(({ tip }, i) => resource('bt:String', resourceIds.command(i, 'Tip'), tip)),
    ]),
  ]);

const value = (name: string, text: string): XmlElement => element(name, { DefaultValue: text });
const reference = (name: string, resid: string): XmlElement => element(name, { resid });
const resource = (name: string, id: string, text: string): XmlElement => element(name, { id, DefaultValue: text });
