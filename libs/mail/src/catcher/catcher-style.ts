/** The tokens of Ebbline's look, as far as the two pages of the catcher need them. */
export const CATCHER_STYLE = `
:root { color-scheme: light dark; --ground: #edf2ee; --sheet: #fbfcfb; --hairline: #d3e2d8; --ink: #17212b; --ink-soft: #4f5d5a; --action: #21418f; }
@media (prefers-color-scheme: dark) {
  :root { --ground: #10171a; --sheet: #172024; --hairline: #22362f; --ink: #e6ebe4; --ink-soft: #a2b0a9; --action: #94b5ff; }
}
* { box-sizing: border-box; }
body { margin: 0; padding: 24px; background: var(--ground); color: var(--ink); font: 14px/1.5 "Noto Sans", "Segoe UI", sans-serif; font-variant-numeric: tabular-nums; }
main { max-width: 960px; }
h1 { margin: 0 0 4px; font-size: 22px; font-weight: 600; overflow-wrap: anywhere; }
h2 { margin: 24px 0 8px; font-size: 14px; font-weight: 600; }
p { margin: 0 0 16px; color: var(--ink-soft); }
a { color: var(--action); }
a:focus-visible, iframe:focus-visible, summary:focus-visible { outline: 2px solid var(--action); outline-offset: 2px; }
.sheet { background: var(--sheet); border-top: 1px solid var(--hairline); border-bottom: 1px solid var(--hairline); }
ol { margin: 0; padding: 0; list-style: none; }
li { padding: 8px 12px; border-top: 1px solid var(--hairline); overflow-wrap: anywhere; }
li:first-child { border-top: 0; }
li a { font-weight: 600; text-decoration: none; }
li a:hover { text-decoration: underline; }
li span { display: block; color: var(--ink-soft); font-size: 13px; }
dl { display: grid; grid-template-columns: max-content 1fr; gap: 2px 16px; margin: 0; padding: 12px; font-size: 13px; }
dt { color: var(--ink-soft); }
dd { margin: 0; overflow-wrap: anywhere; }
iframe { display: block; width: 100%; height: 720px; border: 0; background: #ffffff; resize: vertical; }
pre { margin: 0; padding: 12px; font: 13px/1.5 ui-monospace, monospace; white-space: pre-wrap; overflow-wrap: anywhere; }
main > p:last-child { margin-top: 16px; }
summary { padding: 8px 12px; cursor: pointer; }
`;
