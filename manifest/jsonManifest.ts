import { files, ribbonIconSizes } from './source';
import type { ManifestSource } from './source';

/** Version of the schema: the lowest that the documentation names for custom functions. */
const schemaVersion = '1.25';

/**
 * The unified manifest for Microsoft 365, as a value to be written as JSON.
 * The functions are named by the address of their metadata, not listed: a list in the manifest has no place for
 * `allowErrorForDataTypeAny`, without which an error cell in a range keeps a function from being called at all.
 *
 * @source   Microsoft's documentation: "Configure custom functions with the unified manifest for Microsoft 365"; the published schema
 *           of version 1.25.
 */
export function jsonManifest(source: ManifestSource): object {
  const { url, namespace, ribbon: { tab, group, pane, commands } } = source;
  const requirements = { capabilities: source.requirementSets };
  const icons = ribbonIconSizes.map((size) => ({ size, url: url(files.icon(size)) }));
  return {
    $schema: `https://developer.microsoft.com/json-schemas/teams/v${schemaVersion}/MicrosoftTeams.schema.json`,
    manifestVersion: schemaVersion,
    id: source.id,
    version: source.version.replace(/\.0$/, ''), // three numbers here
    name: { short: source.name, full: source.fullName },
    description: { short: source.shortDescription, full: source.description },
    developer: {
      name: source.provider,
      websiteUrl: url(files.about),
      privacyUrl: url(files.about),
      termsOfUseUrl: url(files.about),
    },
    localizationInfo: { defaultLanguageTag: source.language.toLowerCase() },
    icons: { outline: files.icon('outline'), color: files.icon(192) },
    accentColor: source.accentColor,
    validDomains: [new URL(source.host).host],
    authorization: { permissions: { resourceSpecific: [{ name: 'Document.ReadWrite.User', type: 'Delegated' }] } },
    extensions: [
      {
        requirements: { scopes: ['workbook'], ...requirements },
        runtimes: [
          {
            requirements,
            id: 'SharedRuntime',
            type: 'general',
            lifetime: 'long',
            code: { page: url(files.page), script: url(files.script) },
            actions: [{ id: pane.controlId, type: 'openPage', view: pane.paneId }, ...commands.map(({ action }) => ({ id: action, type: 'executeFunction' }))],
            customFunctions: {
              namespace: { id: namespace, name: namespace },
              allowCustomDataForDataTypeAny: true,
              metadataUrl: url(files.metadata),
            },
          },
        ],
        ribbons: [
          {
            contexts: ['default'],
            tabs: [
              {
                builtInTabId: tab,
                groups: [
                  {
                    id: group.id,
                    label: group.label,
                    icons,
                    controls: [
                      {
                        id: pane.controlId,
                        type: 'button',
                        label: pane.label,
                        icons,
                        supertip: { title: pane.tipTitle, description: pane.tip },
                        actionId: pane.controlId,
                      },
                      ...commands.map(({ controlId, action, label, tipTitle, tip }) => ({
                        id: controlId, type: 'button', label, icons, supertip: { title: tipTitle, description: tip }, actionId: action,
                      })),
                    ],
                  },
                ],
              },
            ],
          },
        ],
      },
    ],
  };
}
