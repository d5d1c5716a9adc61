export interface PageFrame {
  /** Fresh for each page. */
  nonce: string;
  /** Where the page's own files come from, as the policy names it. */
  source: string;
  script: string;
  style: string;
  language: string;
}

/** The page's frame: nothing but the bundled script and style may load or run. */
export function pageHtml({ nonce, source, script, style, language }: PageFrame): string {
  const policy = `default-src 'none'; script-src 'nonce-${nonce}'; style-src ${source} 'nonce-${nonce}'`;
  return `<!DOCTYPE html>
<html lang="${quoted(language)}">
<head>
<meta charset="utf-8">
<meta http-equiv="Content-Security-Policy" content="${quoted(policy)}">
<meta name="viewport" content="width=device-width, initial-scale=1">
<meta property="csp-nonce" content="${nonce}">
<link rel="stylesheet" href="${quoted(style)}">
<title>Tapwright</title>
</head>
<body>
<script nonce="${nonce}" src="${quoted(script)}"></script>
</body>
</html>`;
}

/** 128 bits from the platform's own source, as hexadecimal digits. */
export function newNonce(): string {
  const bytes = crypto.getRandomValues(new Uint8Array(16));
  return Array.from(bytes, (byte) => byte.toString(16).padStart(2, '0')).join('');
}

function quoted(text: string): string {
  return text.replace(/[&"<>]/g, (sign) => `&#${sign.charCodeAt(0)};`);
}
