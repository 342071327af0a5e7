/** Plain, legible in grey, quiet on paper: colour is only ever a second sign beside words, weight or dash. */
export const STYLE = `
:root { --ink: #1d2328; --quiet: #5a646d; --line: #c9ced2; --band: #f3f5f6; }
* { box-sizing: border-box; }
html { color: var(--ink); background: #fff; font: 15px/1.5 system-ui, 'Helvetica Neue', Arial, sans-serif; }
body { max-width: 62rem; margin: 0 auto; padding: 1.5rem 1.5rem 4rem; }
h1 { font-size: 1.7rem; line-height: 1.2; margin: 0 0 .2rem; }
h2 { font-size: 1.25rem; margin: 2.6rem 0 .6rem; padding-bottom: .2rem; border-bottom: 2px solid var(--ink); }
h3 { font-size: 1rem; margin: 1.6rem 0 .4rem; }
p { margin: .4rem 0; max-width: 46rem; }
.about, .quiet, figcaption { color: var(--quiet); }
.verdict { max-width: none; margin: 1.2rem 0; padding: .9rem 1.1rem; border: 1px solid var(--line); border-left: .5rem solid var(--ink); font-size: 1.1rem; }
.verdict.fault { border-left-style: double; }
.caution { max-width: none; margin: 1rem 0; padding: .6rem 1.1rem; border: 1px solid var(--line); background: var(--band); }
.tiles { display: flex; flex-wrap: wrap; gap: .6rem; margin: 1rem 0; padding: 0; list-style: none; }
.tiles li { flex: 1 1 7rem; padding: .5rem .8rem; border: 1px solid var(--line); }
.tiles b { display: block; font-size: 1.3rem; font-variant-numeric: tabular-nums; }
nav ul { columns: 2; padding-left: 1.2rem; max-width: 40rem; }
a { color: inherit; }
table { border-collapse: collapse; width: 100%; margin: .8rem 0; font-size: .87rem; font-variant-numeric: tabular-nums; }
caption { text-align: left; font-weight: 600; padding-bottom: .3rem; }
th, td { padding: .22rem .5rem; text-align: left; vertical-align: top; border-bottom: 1px solid var(--line); overflow-wrap: break-word; }
th { border-bottom: 1px solid var(--ink); font-weight: 600; overflow-wrap: normal; }
.n { text-align: right; white-space: nowrap; overflow-wrap: normal; }
.table label { display: block; cursor: pointer; color: var(--quiet); padding: 0 .5rem .4rem; }
.finding { margin: 1.2rem 0; padding: .2rem 0 .2rem 1rem; border-left: 3px solid var(--line); }
.finding.error { border-left: 5px solid var(--ink); }
.finding h3 { margin: 0 0 .2rem; }
.finding h3 span { font-weight: 400; color: var(--quiet); }
.pictures { display: grid; grid-template-columns: repeat(auto-fit, minmax(15rem, 1fr)); gap: .8rem; margin: .6rem 0; }
figure { margin: .8rem 0; }
figure svg { display: block; width: 100%; height: auto; border: 1px solid var(--line); }
.pictures figure { margin: 0; max-width: 26rem; }
figcaption { font-size: .85rem; padding-top: .2rem; }
dl { display: grid; grid-template-columns: max-content 1fr; gap: .1rem 1rem; margin: .6rem 0; max-width: 52rem; }
dt { color: var(--quiet); }
dd { margin: 0; }
.sheet { content-visibility: auto; contain-intrinsic-size: auto 22rem; }
@media screen { .table:not(:has(input:checked)) .folded { display: none; } }
@media print {
  @page { size: A4; margin: 16mm 14mm 18mm; @bottom-right { content: counter(page) ' / ' counter(pages); font: 8pt sans-serif; color: #5a646d; } }
  html { font-size: 9.5pt; }
  body { max-width: none; padding: 0; }
  nav, .table label { display: none; }
  h2, h3, caption { break-after: avoid; }
  tr, figure, .finding, .tiles, .verdict, .caution { break-inside: avoid; }
  thead { display: table-header-group; }
  .sheet { content-visibility: visible; }
  figure.view svg { max-height: 210mm; }
}
`;
