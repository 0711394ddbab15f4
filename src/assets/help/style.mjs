/** The look of the help page: one column of text that reads well on paper and beside a sheet. */
export const style = `
body { margin: 0; background: #f6f8f7; color: #1d2b30; font: 16px/1.55 system-ui, "Segoe UI", "Helvetica Neue", Arial, sans-serif; }
main { max-width: 46rem; margin: 0 auto; padding: 2rem 1rem 4rem; }
h1 { font-size: 1.7rem; line-height: 1.25; margin: 0 0 1rem; color: #12343b; }
h2 { font-size: 1.25rem; margin: 2.2rem 0 .6rem; color: #12343b; }
h3 { font: 600 1rem/1.4 ui-monospace, Consolas, monospace; margin: 2rem 0 .4rem; padding-top: .8rem; border-top: 1px solid #cfdadc; overflow-wrap: anywhere; }
table { border-collapse: collapse; width: 100%; margin: .6rem 0; font-size: .94rem; }
th, td { text-align: left; vertical-align: top; padding: .35rem .7rem .35rem 0; border-bottom: 1px solid #dfe8e9; }
th { font-weight: 600; }
code { font: .94em ui-monospace, Consolas, monospace; background: #e8f0f0; padding: .1em .35em; border-radius: 3px; overflow-wrap: anywhere; }
nav a { margin-right: .8rem; }
a { color: #0b6068; }
.caution { background: #fff4df; border-left: 4px solid #d09a2d; padding: .7rem 1rem; margin: 1.2rem 0; }
`;
