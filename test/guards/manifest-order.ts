const BASE = "http://schemas.microsoft.com/office/appforoffice/1.1";
const OVERRIDES = "http://schemas.microsoft.com/office/taskpaneappversionoverrides";
const TYPES = "http://schemas.microsoft.com/office/officeappbasictypes/1.0";

/** "?" may be left out, "+" stands once or more, "*" any number of times, no sign exactly once. */
type Children = readonly string[];

// The sequences of the published schemas (OfficeAppManifestV1_1.xsd, TaskPaneAppVersionOverridesV1_0.xsd) for a task pane add-in, as the platform's
// manifest reference gives them; IconUrl to AppDomains are optional there and wanted here, because Excel shows them.
// What is allowed there and of no use to us is left out, so that it is refused.
const PARTS: readonly [space: string, name: string, children: Children][] = [
  [BASE, "OfficeApp", ["Id", "Version", "ProviderName", "DefaultLocale", "DisplayName", "Description", "IconUrl", "HighResolutionIconUrl", "SupportUrl", "AppDomains", "Hosts", "Requirements", "DefaultSettings", "Permissions", "VersionOverrides"]],
  [BASE, "AppDomains", ["AppDomain+"]],
  [BASE, "Hosts", ["Host+"]],
  [BASE, "Requirements", ["Sets"]],
  [BASE, "Sets", ["Set+"]],
  [BASE, "DefaultSettings", ["SourceLocation"]],
  ...["Id", "Version", "ProviderName", "DefaultLocale", "DisplayName", "Description", "IconUrl", "HighResolutionIconUrl", "SupportUrl", "AppDomain", "Host", "Set", "SourceLocation", "Permissions"].map((name): [string, string, Children] => [BASE, name, []]),
  [OVERRIDES, "VersionOverrides", ["Description?", "Requirements?", "Hosts", "Resources"]],
  [OVERRIDES, "Hosts", ["Host+"]],
  [OVERRIDES, "Host", ["Runtimes", "AllFormFactors", "DesktopFormFactor"]],
  [OVERRIDES, "Runtimes", ["Runtime"]],
  [OVERRIDES, "AllFormFactors", ["ExtensionPoint"]],
  [OVERRIDES, "DesktopFormFactor", ["GetStarted", "FunctionFile", "ExtensionPoint+"]],
  [OVERRIDES, "GetStarted", ["Title", "Description", "LearnMoreUrl"]],
  [OVERRIDES, "ExtensionPoint CustomFunctions", ["Script", "Page", "Metadata", "Namespace"]],
  [OVERRIDES, "ExtensionPoint PrimaryCommandSurface", ["OfficeTab+"]],
  [OVERRIDES, "Script", ["SourceLocation"]],
  [OVERRIDES, "Page", ["SourceLocation"]],
  [OVERRIDES, "Metadata", ["SourceLocation"]],
  [OVERRIDES, "OfficeTab", ["Group+"]],
  [OVERRIDES, "Group", ["Label", "Icon", "Control+"]],
  [OVERRIDES, "Control Button", ["Label", "Tooltip?", "Supertip", "Icon", "Action", "Enabled?"]],
  [OVERRIDES, "Supertip", ["Title", "Description"]],
  [OVERRIDES, "Icon", ["Image+"]],
  [OVERRIDES, "Action ShowTaskpane", ["TaskpaneId", "SourceLocation"]],
  [OVERRIDES, "Action ExecuteFunction", ["FunctionName"]],
  [OVERRIDES, "Resources", ["Images", "Urls", "ShortStrings", "LongStrings"]],
  ...["Runtime", "FunctionFile", "Title", "Description", "LearnMoreUrl", "SourceLocation", "Namespace", "Label", "TaskpaneId", "FunctionName", "Enabled"].map((name): [string, string, Children] => [OVERRIDES, name, []]),
  [TYPES, "Images", ["Image+"]],
  [TYPES, "Urls", ["Url+"]],
  [TYPES, "ShortStrings", ["String+"]],
  [TYPES, "LongStrings", ["String+"]],
  ...["Image", "Url", "String"].map((name): [string, string, Children] => [TYPES, name, []]),
];
const CHILDREN = new Map(PARTS.map(([space, name, children]) => [`${space} ${name}`, children]));

/**
 * Whether every element stands where the published schemas have it: namespace, parent, order, number.
 *
 * @returns one sentence a fault
 */
export function orderFaults(root: Element): string[] {
  if (root.localName !== "OfficeApp" || typeOf(root) !== "TaskPaneApp") return ["The manifest is not an OfficeApp of the type TaskPaneApp."];
  return [root, ...root.getElementsByTagName("*")].flatMap(faultsOf);
}

/** The xsi:type of an element, "" where it has none. */
export function typeOf(element: Element): string {
  return element.getAttributeNS("http://www.w3.org/2001/XMLSchema-instance", "type") ?? "";
}

function faultsOf(parent: Element): string[] {
  const { namespaceURI: space, localName: name } = parent;
  const wanted = CHILDREN.get(`${space} ${name} ${typeOf(parent)}`) ?? CHILDREN.get(`${space} ${name}`);
  if (wanted === undefined) return [`${name}${typeOf(parent) === "" ? "" : ` of the type ${typeOf(parent)}`} is no element of the schema ${space}.`];
  const found = [...parent.children].map((child) => child.localName);
  const faults: string[] = [];
  let from = 0;
  for (const entry of wanted) {
    const child = entry.replace(/[?+*]$/, "");
    let here = 0;
    while (found[from + here] === child) here++;
    from += here;
    if (here === 0 && !/[?*]$/.test(entry)) faults.push(found.includes(child) ? `${child} stands out of order in ${name}.` : `${name} has no ${child}.`);
    if (here > 1 && !/[+*]$/.test(entry)) faults.push(`${name} has ${here} times ${child}.`);
  }
  const over = found[from];
  if (over !== undefined) faults.push(`${over} does not belong in ${name} at that place.`);
  return faults;
}
