import { readFileSync } from 'node:fs';
import path from 'node:path';
import ts from 'typescript';

export interface BrowserFile {
  readonly body: string;
  readonly headers: Readonly<Record<string, string>>;
}

/** A file of `browser/` as a classic script; its imports are types alone. */
function script(name: string): string {
  const source = readFileSync(path.join(__dirname, 'browser', `${name}.ts`), 'utf8');
  const { outputText } = ts.transpileModule(source, {
    compilerOptions: { target: ts.ScriptTarget.ES2022, module: ts.ModuleKind.CommonJS },
  });
  return `(function (exports) {\n${outputText}\n})({});\n`;
}

const STYLE = `
:root { --colorPrimary: #0b5d63; --colorBackground: #ffffff; --colorText: #17211d; --colorTextSecondary: #4f5c55;
  --colorTextPlaceholder: #6d776f; --colorDanger: #8c2f1b; --fontFamily: system-ui, sans-serif; --fontSizeBase: 17px;
  --fontSizeSm: 15px; --fontWeightNormal: 400; --fontWeightMedium: 600; --borderRadius: 2px; --spacingUnit: 4px; }
* { box-sizing: border-box; }
html { font-size: var(--fontSizeBase); }
body { margin: 0; padding: 2px; font-family: var(--fontFamily); color: var(--colorText); background: transparent; }
.Label { display: block; margin-bottom: var(--spacingUnit); font-size: var(--fontSizeSm); font-weight: var(--fontWeightMedium); }
.Input { width: 100%; min-height: 48px; padding: 10px 12px; border: 1px solid var(--colorTextSecondary);
  border-radius: var(--borderRadius); background: var(--colorBackground); color: var(--colorText); font: inherit;
  font-variant-numeric: tabular-nums; }
.Input::placeholder { color: var(--colorTextPlaceholder); opacity: 1; }
.Input:focus { outline: 2px solid var(--colorPrimary); outline-offset: 1px; }
.Input--invalid { border-color: var(--colorDanger); }
.Error { min-height: 1.4em; margin: 2px 0 4px; line-height: 1.3; font-size: var(--fontSizeSm); color: var(--colorDanger); }
.row { display: flex; gap: calc(var(--spacingUnit) * 3); }
.row > div { flex: 1; min-width: 0; }
`;

const CARD_FORM = `<form novalidate>
<div><label class="Label" for="number">Card number</label>
<input class="Input" id="number" autocomplete="cc-number" inputmode="numeric" placeholder="1234 1234 1234 1234" aria-describedby="number-error">
<div class="Error" id="number-error" role="alert"></div></div>
<div class="row"><div><label class="Label" for="expiry">Expiration date</label>
<input class="Input" id="expiry" autocomplete="cc-exp" inputmode="numeric" placeholder="MM / YY" aria-describedby="expiry-error">
<div class="Error" id="expiry-error" role="alert"></div></div>
<div><label class="Label" for="cvc">Security code</label>
<input class="Input" id="cvc" autocomplete="cc-csc" inputmode="numeric" placeholder="CVC" aria-describedby="cvc-error">
<div class="Error" id="cvc-error" role="alert"></div></div></div></form>`;

const CHALLENGE = `<style>body { display: grid; place-items: center; min-height: 100vh; padding: 16px; background: rgb(23 33 29 / 60%); }
main { max-width: 420px; padding: 20px; background: #fff; border: 1px solid #17211d; }
h1 { margin: 0 0 8px; font-size: 20px; } p { margin: 0 0 20px; }
button { min-height: 48px; padding: 0 16px; margin: 0 8px 8px 0; border: 1px solid #17211d; border-radius: 2px; background: #fff; color: #17211d; font: inherit; }
button:first-of-type { background: #17211d; color: #fff; }</style>
<main role="dialog" aria-modal="true" aria-labelledby="title"><h1 id="title">Your bank asks</h1>
<p>This stands in for the page on which a bank makes sure that it is you who pays.</p>
<button type="button" value="complete">Complete authentication</button><button type="button" value="fail">Fail authentication</button></main>`;

const PAGES = {
  payment: { title: 'Card details', body: CARD_FORM },
  challenge: { title: 'Authentication', body: CHALLENGE },
  controller: { title: 'Controller', body: '' },
} as const;

/** Everything that a browser fetches, by path. Only pages of `webOrigin` may frame the forms. */
export function browserFiles(webOrigin: string): ReadonlyMap<string, BrowserFile> {
  const policy = [
    "default-src 'none'",
    "script-src 'self'",
    "style-src 'self' 'unsafe-inline'",
    "connect-src 'self'",
    "base-uri 'none'",
    "form-action 'none'",
    `frame-ancestors ${webOrigin}`,
  ].join('; ');
  const fresh = { 'cache-control': 'no-store', 'x-content-type-options': 'nosniff' };
  const scriptHeaders = {
    ...fresh,
    'content-type': 'text/javascript; charset=utf-8',
    'access-control-allow-origin': '*',
    'cross-origin-resource-policy': 'cross-origin',
  };
  const pageHeaders = {
    ...fresh,
    'content-type': 'text/html; charset=utf-8',
    'content-security-policy': policy,
    'cross-origin-resource-policy': 'cross-origin',
    'referrer-policy': 'no-referrer',
  };
  const files = new Map<string, BrowserFile>();
  const main = { body: script('script'), headers: scriptHeaders };
  files.set('/v3/stripe.js', main);
  files.set('/endive/stripe.js', main);
  files.set('/v3/frame.js', { body: script('frame'), headers: scriptHeaders });
  for (const [role, { title, body }] of Object.entries(PAGES)) {
    files.set(`/v3/${role}.html`, {
      headers: pageHeaders,
      body: `<!doctype html><html lang="en" data-role="${role}" data-host="${webOrigin}"><head><meta charset="utf-8"><meta name="viewport" content="width=device-width"><title>${title}</title><style>${STYLE}</style></head><body>${body}<script src="/v3/frame.js"></script></body></html>`,
    });
  }
  return files;
}
