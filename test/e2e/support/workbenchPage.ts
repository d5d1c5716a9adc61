/** How the workbench starts. */
export interface PageOptions {
  /** Label of the theme, as the theme picker shows it. */
  theme?: string;
  /** Language of the display, such as `de`. */
  language?: string;
  /** The folder counts as untrusted until the user says otherwise. */
  untrusted?: boolean;
  /** Settings beside those that keep a test calm. */
  settings?: Record<string, unknown>;
}

/** The folder that the explorer shows, as a path of the test file system. */
export const workspacePath = '/bench';

const calm = {
  'workbench.reduceMotion': 'on',
  'workbench.startupEditor': 'none',
  'workbench.tips.enabled': false,
  'workbench.enableExperiments': false,
  'window.autoDetectColorScheme': false,
  'window.autoDetectHighContrast': false,
  'files.autoSave': 'off',
  'editor.autoClosingBrackets': 'never',
  'editor.autoClosingQuotes': 'never',
  'editor.quickSuggestions': { strings: 'off', other: 'off', comments: 'off' },
  'editor.suggestOnTriggerCharacters': false,
  'security.workspace.trust.startupPrompt': 'never',
  'extensions.ignoreRecommendations': true,
  'telemetry.telemetryLevel': 'off',
};

/**
 * The page that starts the web build.
 * @param authority host and port under which everything is served
 */
export function workbenchPage(authority: string, options: PageOptions): string {
  const extension = (name: string) => ({ scheme: 'http', authority, path: `/static/${name}` });
  const product = {
    productConfiguration: {
      nameShort: 'Workbench',
      nameLong: 'Workbench',
      // A name below the page's own, so that the service worker of a webview is of the same site.
      webviewContentExternalBaseUrlTemplate: `http://{{uuid}}.${authority}/static/build/out/vs/workbench/contrib/webview/browser/pre/`,
      extensionEnabledApiProposals: { 'tapwright-test.file-system': ['fileSearchProvider'] },
    },
    folderUri: options.untrusted
      ? { scheme: 'vscode-vfs', authority: 'bench', path: workspacePath }
      : { scheme: 'bench', path: workspacePath },
    additionalBuiltinExtensions: [extension('extension'), extension('fileSystem')],
    configurationDefaults: {
      ...calm,
      'workbench.colorTheme': options.theme ?? 'Default Dark Modern',
      ...options.settings,
    },
    enableWorkspaceTrust: options.untrusted === true,
  };
  const nls = options.language === undefined ? {} : { availableLanguages: { '*': options.language } };
  return `<!doctype html>
<html>
<head>
<meta charset="utf-8">
<title>Workbench</title>
<link rel="icon" href="/static/build/favicon.ico">
<link rel="stylesheet" data-name="vs/workbench/workbench.web.main" href="/static/build/out/vs/workbench/workbench.web.main.css">
</head>
<body aria-label="">
<script>window.product = ${JSON.stringify(product).replaceAll('<', '\\u003c')};</script>
<script src="/static/build/out/vs/loader.js"></script>
<script src="/static/build/out/vs/webPackagePaths.js"></script>
<script>
const base = location.origin + '/static/build';
for (const name of Object.keys(self.webPackagePaths)) {
  self.webPackagePaths[name] = base + '/node_modules/' + name + '/' + self.webPackagePaths[name];
}
require.config({ baseUrl: base + '/out', recordStats: true, paths: self.webPackagePaths, 'vs/nls': ${JSON.stringify(nls)} });
performance.mark('code/willLoadWorkbenchMain');
</script>
<script src="/static/build/out/vs/workbench/workbench.web.main.nls.js"></script>
<script src="/static/build/out/vs/workbench/workbench.web.main.js"></script>
<script src="/static/build/out/vs/code/browser/workbench/workbench.js"></script>
</body>
</html>`;
}
