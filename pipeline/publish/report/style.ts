/**
 * The look of the report: a printed data book. Every pair of text and ground has a contrast of at least 4.5, every mark of
 * a plot at least 3 (WCAG 2.2 AA), in light and in dark.
 */
const COLOURS = `
:root{color-scheme:light dark;--paper:#fbfaf6;--panel:#f2efe6;--ink:#20242a;--soft:#565b63;--rule:#d6d0c2;--hair:#e6e1d5;--link:#1b4f72;--mark:#8c1d5a;--band:#1b4f72;
--s0:#1b4f72;--s1:#8a4414;--s2:#5b3a8c;--s3:#0f6b6b;--s4:#6b5200;--s5:#4d5561}
@media (prefers-color-scheme:dark){:root{--paper:#16191d;--panel:#1f242a;--ink:#e4e1d9;--soft:#a8acb3;--rule:#434a52;--hair:#2b3138;--link:#8cc4e6;--mark:#f091c0;--band:#8cc4e6;
--s0:#8cc4e6;--s1:#eda873;--s2:#c0a5ee;--s3:#74cdc8;--s4:#d9bf62;--s5:#b4bbc4}}
`;

const TEXT = `
*{box-sizing:border-box}
html{-webkit-text-size-adjust:100%}
body{margin:0;overflow-wrap:anywhere;background:var(--paper);color:var(--ink);font:17px/1.5 "Iowan Old Style","Palatino Linotype",Palatino,"Book Antiqua",Georgia,"DejaVu Serif",serif}
main,.head,footer{max-width:84rem;margin:0 auto;padding:0 1.5rem}
a{color:var(--link);text-underline-offset:.15em;text-decoration-thickness:1px}
a:hover{text-decoration-thickness:2px}
:focus-visible{outline:3px solid var(--mark);outline-offset:2px}
.skip{position:absolute;left:-60rem;background:var(--paper);padding:.5rem 1rem;z-index:2}
.skip:focus{left:.5rem;top:.5rem}
.head{display:flex;flex-wrap:wrap;gap:.1rem 1.5rem;align-items:baseline;padding-top:.8rem;padding-bottom:.45rem}
.head p{margin:0;font-style:italic;overflow-wrap:anywhere}
header{border-bottom:4px double var(--rule)}
nav ul{display:flex;flex-wrap:wrap;gap:.1rem 1.1rem;list-style:none;margin:0;padding:0;font:.84rem/1.7 system-ui,"Segoe UI","DejaVu Sans",sans-serif}
nav [aria-current]{color:var(--ink);text-decoration:none;font-weight:700}
h1{font-weight:600;font-size:1.75rem;line-height:1.2;margin:1.3rem 0 .3rem;overflow-wrap:anywhere}
h2{font-weight:600;font-size:1.2rem;margin:2.2rem 0 .6rem;padding-top:.5rem;border-top:1px solid var(--rule)}
h3{font-weight:600;font-size:1.02rem;margin:1.2rem 0 .3rem;overflow-wrap:anywhere}
p,li,dd{overflow-wrap:anywhere}
p{margin:.35rem 0;max-width:74ch}
li{max-width:74ch}
.lead{font-size:1.05rem}
.soft,figcaption,caption{color:var(--soft)}
.word{font-variant-caps:all-small-caps;letter-spacing:.04em;font-size:1.08em}
.need{color:var(--mark);font-weight:600}
code,.eq{font-family:ui-monospace,"DejaVu Sans Mono",Menlo,Consolas,monospace;font-size:.86em;overflow-wrap:anywhere}
.eq{font-family:inherit;font-size:1.08em;margin:.4rem 0 .4rem 1rem}
.i,var{font-style:italic}
footer{margin-top:3rem;padding-top:.7rem;padding-bottom:2rem;border-top:4px double var(--rule);color:var(--soft);font-size:.86rem}
footer p{max-width:100ch}
`;

const TABLES = `
table{border-collapse:collapse;font:.82rem/1.4 system-ui,"Segoe UI","DejaVu Sans",sans-serif;font-variant-numeric:tabular-nums}
caption{text-align:left;padding:0 0 .35rem;font:italic .95rem/1.4 Georgia,"DejaVu Serif",serif;max-width:min(74ch,calc(100vw - 2rem))}
th,td{padding:.22rem .8rem .22rem 0;text-align:left;vertical-align:top;border-bottom:1px solid var(--hair);max-width:26rem;overflow-wrap:break-word}
.measurements{font-size:.78rem}.measurements th,.measurements td{padding-right:.6rem}
.measurements tbody th[scope=rowgroup]{padding-top:.7rem;max-width:60rem}
.w{min-width:12rem;overflow-wrap:anywhere}
thead th,thead td{border-bottom:1px solid var(--soft);vertical-align:bottom;font-weight:600}
tbody th{font-weight:400}
tbody.group th[scope=rowgroup]{font:600 1rem/1.4 "Iowan Old Style","Palatino Linotype",Palatino,Georgia,"DejaVu Serif",serif;padding-top:.9rem;max-width:60rem}
.n{text-align:right;white-space:nowrap}
thead .n{white-space:normal}
.t{white-space:nowrap}
.wide{overflow-x:auto;max-width:100%;margin:.5rem 0}
.rangebar{display:block;width:90px;height:10px}
.rangebar .track{fill:var(--hair)}.rangebar .reach{fill:var(--s0)}
.tally{display:flex;flex-wrap:wrap;gap:.2rem 2.2rem;list-style:none;padding:0;margin:.6rem 0}
.tally b{font-size:1.5rem;font-weight:600;margin-right:.35rem}
.todo{padding-left:0;list-style:none;display:grid;gap:.8rem 2rem;grid-template-columns:repeat(auto-fit,minmax(min(100%,30rem),1fr));margin:.6rem 0;align-items:start}
.todo>li,.flag{border-left:3px solid var(--mark);padding:0 0 .1rem .9rem;max-width:90ch;min-width:0}.flag{margin:.8rem 0}.todo>li{font-size:.93rem;line-height:1.42}
.flag.notice{border-left:3px double var(--rule)}
.todo p,.flag p{margin:.1rem 0;max-width:90ch}
.cols>*{min-width:0}.cols{display:grid;gap:0 2.5rem;grid-template-columns:repeat(auto-fit,minmax(min(100%,24rem),1fr))}
.search{display:flex;flex-wrap:wrap;gap:.4rem .8rem;align-items:center;margin:.6rem 0;font:.9rem system-ui,"DejaVu Sans",sans-serif}
.search[hidden]{display:none}
.search input{font:inherit;padding:.35rem .6rem;border:1px solid var(--soft);background:var(--paper);color:var(--ink);width:min(100%,24rem)}
dl.facts{display:grid;grid-template-columns:max-content 1fr;gap:.1rem 1.2rem;margin:.4rem 0;font-size:.95rem}
dl.facts dt{color:var(--soft)}dl.facts dd{margin:0}
.pager{display:flex;flex-wrap:wrap;justify-content:space-between;gap:.2rem 2rem;font-size:.9rem;margin-top:1rem}
`;

const PLOTS = `
.plots{display:grid;gap:1rem 2rem;grid-template-columns:repeat(auto-fit,minmax(min(100%,27rem),1fr));align-items:start;margin:1rem 0}
figure{margin:0;min-width:0}
figcaption{font-size:.9rem;line-height:1.4}
.plot{display:block;width:100%;height:auto}
svg text{fill:var(--ink);font:13px system-ui,"Segoe UI","DejaVu Sans",sans-serif}
svg .tick{fill:var(--soft)}svg .fine{font-size:11px;fill:var(--soft);text-anchor:middle}svg .bx,svg .tx,svg .label{text-anchor:middle}svg .ly{text-anchor:end}
svg .leader{fill:none;stroke:var(--soft);stroke-width:.8}svg .end{paint-order:stroke;stroke:var(--paper);stroke-width:3px}
svg .letter{font-weight:700;font-size:14px;text-anchor:middle;paint-order:stroke;stroke:var(--paper);stroke-width:3px}
svg .axis{fill:none;stroke:var(--soft)}svg .grid{fill:none;stroke:var(--hair)}svg .zero{stroke:var(--rule)}
svg .transition path{fill:none;stroke:var(--ink);stroke-width:1;stroke-dasharray:2 4}svg .transition .limits{stroke-dasharray:none;stroke-width:1.5}svg .transition text{fill:var(--ink);font-size:12px}
svg .curve{fill:none;stroke:var(--ink);stroke-width:1.5}
svg .band{fill:var(--band);fill-opacity:.17}svg .new{fill:none;stroke:var(--ink);stroke-width:1;stroke-dasharray:5 4;stroke-opacity:.75}
svg .camp{fill:none;stroke:currentColor;stroke-width:1.8;stroke-dasharray:7 4}svg .whisker{fill:none;stroke:currentColor;stroke-width:2}svg .campname{font-weight:600;text-anchor:end;paint-order:stroke;stroke:var(--paper);stroke-width:3px}
svg .pt,svg .rs,.key g{stroke-width:1.4;stroke:currentColor;fill:var(--paper)}
svg .kept{fill:currentColor}
svg .notfitted{stroke-dasharray:2 1.6}
svg .interval{fill:none;stroke-width:1.8}
svg .over{fill:none;stroke:currentColor;stroke-width:1.6}
svg .ring{fill:none;stroke:var(--mark);stroke-width:1.5;stroke-dasharray:none}
svg .hole{fill:var(--paper);stroke:none}
svg .stem{fill:none;stroke-width:1}svg .arrow{fill:none}
svg .s0{color:var(--s0)}svg .s1{color:var(--s1)}svg .s2{color:var(--s2)}svg .s3{color:var(--s3)}svg .s4{color:var(--s4)}svg .s5{color:var(--s5)}
svg text.s0{fill:var(--s0)}svg text.s1{fill:var(--s1)}svg text.s2{fill:var(--s2)}svg text.s3{fill:var(--s3)}svg text.s4{fill:var(--s4)}svg text.s5{fill:var(--s5)}
.key{width:1.3em;height:1.3em;vertical-align:-.3em;flex:none}
.legend{list-style:none;padding:0;margin:.2rem 0;font:.84rem/1.5 system-ui,"DejaVu Sans",sans-serif}
.legend li{display:flex;gap:.45rem;align-items:baseline;min-width:0}
.legend span{min-width:0;overflow-wrap:anywhere}
.legend .key{align-self:center}
.legend b{flex:none}
`;

const NARROW = `
@media (max-width:40rem){body{font-size:16px}main,.head,footer{padding:0 .9rem}.head{padding-top:.6rem;padding-bottom:.4rem}h1{font-size:1.4rem}
svg text{font-size:17px}svg .letter{font-size:18px}svg .fine{font-size:14px}dl.facts{grid-template-columns:1fr}dl.facts dd{margin:0 0 .3rem .8rem}.eq{margin-left:0}}
`;

const PRINT = `
@page{size:A4;margin:14mm 12mm}
@media print{:root{--paper:#fff;--panel:#fff;--ink:#000;--soft:#444;--rule:#999;--hair:#ccc;--link:#000;--mark:#6d1546;--band:#1b4f72;--s0:#1b4f72;--s1:#8a4414;--s2:#5b3a8c;--s3:#0f6b6b;--s4:#6b5200;--s5:#4d5561}
body{font-size:10pt}nav,.skip,.search,.pager{display:none}main,.head,footer{max-width:none;padding-left:0;padding-right:0}
h1{font-size:15pt}h2{font-size:12pt;margin-top:1.2rem;break-after:avoid}h3{break-after:avoid}
.wide{overflow:visible}table{font-size:7pt;width:100%}caption{font-size:9pt;break-after:avoid}th,td{padding-right:.35rem}.measurements{font-size:6.4pt}.measurements th,.measurements td{padding-right:.3rem}.w{min-width:0}
thead{display:table-header-group}tr,.flag,.todo>li,figure{break-inside:avoid}
.plots{grid-template-columns:1fr 1fr;gap:.5rem 1rem}.cols{grid-template-columns:1fr 1fr}
a{text-decoration:none}footer{font-size:8pt}}
`;

/** The style sheet of every page, without line feeds that cost bytes on each of them. */
export const STYLE = (COLOURS + TEXT + TABLES + PLOTS + NARROW + PRINT).replaceAll("\n", "");
