/** How a sheet looks, within the element only. */
export const STYLE = `
:host {
  --paper: var(--pitch-paper, #fbfcf6); --tint: var(--pitch-tint, #f1f5ea); --ink: var(--pitch-ink, #1c2733); --faint: var(--pitch-faint, #566370);
  --rule: var(--pitch-rule, #c6d2c3); --strong: var(--pitch-strong-rule, #5d6f60); --governs: var(--pitch-governs, #a8281d); --met: var(--pitch-met, #1f6034);
  --not-met: var(--pitch-not-met, #a8281d); --not-shown: var(--pitch-not-shown, #7f5300); --link: var(--pitch-link, #1d4f91);
  display: block; color: var(--ink); background: var(--paper); overflow-x: auto;
  font: var(--pitch-font, 15px/1.4 "Iowan Old Style", "Palatino Linotype", Palatino, "Noto Serif", "DejaVu Serif", serif);
}
:host([hidden]) { display: none; }
section { padding: 10px 14px; }
h2 { margin: 0 0 6px; font-size: 1.2em; }
h3 { margin: 12px 0 4px; font-size: 1em; }
.conditions { display: flex; flex-wrap: wrap; gap: 4px 18px; margin: 0 0 8px; }
select, input { font: inherit; color: inherit; background: var(--paper); border: 1px solid var(--strong); border-radius: 2px; padding: 0 4px; }
input { max-width: 100%; font-variant-numeric: lining-nums tabular-nums; }
input[aria-invalid="true"] { border-color: var(--not-met); border-width: 2px; }
:focus-visible { outline: 2px solid var(--link); outline-offset: 1px; }
table { border-collapse: collapse; }
table.form { width: 100%; border: 2px solid var(--strong); border-width: 2px 1px 1px 2px; }
table.form > * > tr > * { padding: 3px 7px; border: 1px solid var(--rule); vertical-align: baseline; text-align: left; font-weight: normal; }
table.form > thead th { background: var(--tint); color: var(--faint); font-size: 0.85em; }
caption { text-align: left; color: var(--faint); font-size: 0.85em; }
.part > th { font-weight: 600; padding-top: 10px; border-bottom-color: var(--strong); }
.sub > th, th.symbol { font-style: italic; }
.item, .unit, .remark { color: var(--faint); }
.item, table.form > tbody > tr > td.value, thead th.label { text-align: right; font-variant-numeric: lining-nums tabular-nums; }
table.form > tbody > tr > td.value[colspan] { text-align: center; }
td.value strong { padding: 0 5px; border: 1.5px solid var(--governs); border-radius: 50%; }
.remark { font-size: 0.9em; }
.verdict { padding: 0 6px; border: 1.5px solid currentColor; border-radius: 2px; font-weight: 600; }
.met { color: var(--met); } .not-met { color: var(--not-met); } .not-shown { color: var(--not-shown); }
.mark { margin-right: 6px; padding: 0 5px; border: 1.5px solid var(--not-met); border-radius: 10px; color: var(--not-met); font-size: 0.8em; white-space: nowrap; }
.mark.warning { border-color: var(--not-shown); color: var(--not-shown); } .mark.advice { border-color: var(--link); color: var(--link); border-style: dashed; }
.unreadable td { font-family: monospace; white-space: pre-wrap; }
table.own th, table.own td { padding: 1px 10px 1px 6px; border-bottom: 1px solid var(--rule); text-align: right; font-weight: normal; }
figure { margin: 10px 0; } figure img { max-width: 100%; background: #fff; } figcaption { color: var(--faint); }
.told { margin: 0 0 6px; color: var(--not-met); }
.unseen { position: absolute; width: 1px; height: 1px; margin: -1px; overflow: hidden; clip-path: inset(50%); white-space: nowrap; }
`;
