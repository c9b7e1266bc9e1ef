// The style of the record on paper and on a screen: a ruled computation sheet in ink, on light paper only.
//
// 1. One CSS text, no reference to anything outside the document; user text enters it only through cssString.
// 2. On paper the running head repeats on every page, and the margin says which sheet it is, of which document, in which state.
// 3. Every state is a word; tags, bars and ink only repeat it and survive a grey copy.

import { cssString } from './escape.ts';

export interface Face {
  readonly family: string;
  readonly style: 'normal' | 'italic';
  readonly weight: string;
  /** woff2 as a data: URL. */
  readonly url: string;
  readonly range?: string;
}

export interface RecordAssets {
  /** KaTeX's own style sheet; its @font-face rules are replaced by `faces`. */
  readonly formulaStyle: string;
  readonly faces: readonly Face[];
}

export interface PageWords {
  readonly paper: 'A4' | 'Letter';
  /** 'CS-014 rev P1 · in preparation' */
  readonly identity: string;
  readonly footer: string;
}

export function recordStyle(assets: RecordAssets, words: PageWords): string {
  return [assets.faces.map(face).join('\n'), assets.formulaStyle.replace(/@font-face\s*\{[^}]*\}/gu, ''), page(words), look].join(
    '\n',
  );
}

function face(f: Face): string {
  const range = f.range === undefined ? '' : `unicode-range:${f.range};`;
  return `@font-face{font-family:"${f.family}";font-style:${f.style};font-weight:${f.weight};src:url(${f.url}) format("woff2");${range}}`;
}

function page(words: PageWords): string {
  const small = 'font:7.5pt "Atkinson Hyperlegible Next",sans-serif;color:#3a3a37;vertical-align:top;padding-top:3mm';
  return `@page{size:${words.paper};margin:12mm 12mm 19mm 22mm;
@bottom-left{content:${cssString(words.identity)};${small};width:24%;overflow-wrap:anywhere}
@bottom-center{content:${cssString(words.footer)};${small};width:52%;text-align:left}
@bottom-right{content:"Sheet " counter(page) " of " counter(pages);${small};width:24%;text-align:right}}`;
}

const look = `
:root{color-scheme:light;--ink:#1b1d22;--paper:#fdfcf8;--second:#55554f;--rule:#d8d2c2;--desk:#e9e6dd;--author:#4b2f66;--checker:#97391b}
*{box-sizing:border-box}
body{margin:0;background:var(--desk);color:var(--ink);font:400 10pt/1.4 "Atkinson Hyperlegible Next",system-ui,sans-serif;font-variant-numeric:tabular-nums slashed-zero}
.record{max-width:60rem;margin:1.5rem auto;background:var(--paper);border:1px solid var(--rule)}
.head{border-bottom:1.5px solid var(--ink)}
.head dl{display:grid;grid-template-columns:1fr repeat(4,auto);margin:0}
.head dl>div{padding:.45rem .8rem;border-left:1px solid var(--rule)}
.head dl>div:first-child{border-left:0}
.head .names{grid-template-columns:repeat(3,1fr);border-top:1px solid var(--rule)}
.head .names>div{padding:.2rem .8rem;display:flex;gap:.5rem;align-items:baseline}
dt{color:var(--second);font-size:8pt}
dd{margin:0;overflow-wrap:anywhere}
.head h1{font-size:13pt;font-weight:700;line-height:1.2;margin:0}
:focus-visible{outline:2px solid var(--author);outline-offset:2px}
.status{font-weight:700}
main{padding:0 0 1rem}
.front,.back{padding:0 1rem}
h2{font-size:12pt;margin:1.1rem 0 .35rem;line-height:1.25;break-after:avoid}
h3,h4{font-size:10pt;margin:.8rem 0 .25rem;break-after:avoid}
a{color:var(--author)}
p{margin:.25rem 0}
ul,ol{margin:.25rem 0;padding-left:1.3rem}
.fields{display:grid;grid-template-columns:repeat(auto-fill,minmax(11rem,1fr));margin:0 -1rem;border-bottom:1px solid var(--rule)}
.fields>div{padding:.3rem 1rem}
table{border-collapse:collapse;width:100%}
th{font-weight:400;color:var(--second);font-size:8.5pt;text-align:left;vertical-align:bottom}
td{vertical-align:top}
.list th,.list td{padding:.2rem .7rem .2rem 0;border-bottom:1px solid var(--rule)}
.list thead th{border-bottom:1px solid var(--ink)}
.list .num{text-align:right;white-space:nowrap}
.points td:first-child{white-space:nowrap}
.points td:nth-child(2){max-width:17rem}
.list td:last-child,.list th:last-child{padding-right:0}
tr{break-inside:avoid}
thead{display:table-header-group}
.steps{border-top:1px solid var(--rule);border-bottom:1px solid var(--rule);table-layout:fixed}
.steps>thead th{padding:.3rem .7rem;border-bottom:1px solid var(--rule);overflow-wrap:anywhere}
.steps>tbody>tr>td{padding:.05rem .7rem;border-left:1px solid var(--rule);vertical-align:baseline}
.steps>tbody>tr>:first-child{border-left:0}
.steps>tbody>tr>.calc{border-left:1px solid var(--rule)}
.steps>tbody>tr:first-child>td{padding-top:.35rem}
.step>tr:not(:last-child){height:1px}
.steps>tbody>tr:last-child>td,.steps>tbody>tr>td[rowspan]{padding-bottom:.35rem}
.steps .res{text-align:right;overflow-wrap:anywhere}
.steps td.src{font-size:8.5pt;color:var(--second);overflow-wrap:anywhere;vertical-align:top}
.steps h2,.steps h3,.steps h4{margin:.5rem 0 .1rem}
.step,.text{break-inside:avoid}
.section{break-inside:avoid;break-after:avoid}
.steps .section th{font-weight:400;text-align:left;color:var(--ink);font-size:inherit;padding:0 .7rem;border:0}
.criterion>tr:first-child>td{border-top:1px solid var(--rule)}
.criterion>tr:last-child>td,.criterion>tr>td[rowspan]{border-bottom:1px solid var(--rule)}
.t{margin:0;color:var(--second)}
.t .n{color:var(--ink)}
.t::after{content:"";display:block;clear:both}
.eq{overflow-wrap:anywhere}
.eq .katex,.res .katex{font-size:1.12em}
.eq>span{display:inline-block;max-width:100%;margin:.1rem .1em .1rem 0}
.case,.mark{color:var(--ink);font-weight:700;font-size:8.5pt}
.case{display:inline-block;min-width:1.3em}
.long{break-inside:auto}
.states{display:block;margin-top:.1em}
.basis{white-space:nowrap}
.basis::before{content:"· "}
.legend{padding:0 .7rem;font-size:8.5pt;color:var(--second)}
.legend span+span{margin-left:1em}
.met{font-weight:700}
.notmet{font-weight:700;color:var(--checker)}
.bar{display:block;position:relative;width:4.5rem;margin:.2rem 0 .25rem;height:.42rem;border:1px solid var(--ink);border-right:0;print-color-adjust:exact;-webkit-print-color-adjust:exact}
.bar::after{content:"";position:absolute;right:0;top:-.25rem;bottom:-.25rem;border-right:2px solid var(--ink)}
.bar i{display:block;height:100%;background:var(--author);max-width:100%}
.bar.over i{background:repeating-linear-gradient(115deg,var(--checker) 0 2px,var(--paper) 2px 4px)}
.res .bar{margin-left:auto}
.tag{display:inline-block;border:1px solid var(--second);border-radius:1.5px;padding:0 .3em;color:var(--ink);font-size:8pt;line-height:1.35;white-space:normal}
.tag.open{border-style:dashed;font-weight:600}
.note{font-size:8.5pt;color:var(--second);margin:.1rem 0 0}
.wrong{color:var(--checker);font-weight:600}
.role{font-weight:700}
.barred{border-left:3px solid var(--ink);padding-left:.6rem}
.data td,.data th{padding:.15rem .7rem;border-bottom:1px solid var(--rule)}
.data .num{text-align:right}
.data{width:auto;min-width:50%}
.data .used td{font-weight:600}
.data .used td:first-child{border-left:2px solid var(--author)}
.data td.use{color:var(--second);white-space:nowrap}
.data td.use::before{content:"◂ ";color:var(--author)}
.beside td:first-child{white-space:nowrap}
.beside code{overflow-wrap:anywhere}
figure{margin:.4rem 0}
figure img{max-width:100%;max-height:14cm}
.absent{border:1px dashed var(--second);padding:.5rem .7rem;color:var(--second)}
.caution{border-top:1px solid var(--ink);margin-top:1.2rem;padding-top:.4rem;font-size:8.5pt;break-inside:avoid}
code{font:9pt ui-monospace,"DejaVu Sans Mono",monospace}
@media print{
body{background:none;font-size:9pt}
.record{display:table;width:calc(100% - 1px);max-width:none;margin:0;border:0;background:none}
.head{display:table-header-group;break-inside:avoid}
.head>div{border:1px solid var(--ink);margin-bottom:3mm}
.front{margin-top:-1px}
main{display:table-row-group;padding:0}
.front,.back{padding:0}
.fields{margin:0;border:1px solid var(--rule)}
.fields>div{padding:.2rem .8rem}
:root{--rule:#b9b4a6;--paper:#fff;--second:#45453f}
p,li{orphans:2;widows:2}
a{color:inherit;text-decoration:none}
}
@media screen and (max-width:44rem){
.record{margin:0;border:0}
.head dl{grid-template-columns:1fr 1fr}
.head dl>div{border-left:0}
.head .title{grid-column:1/-1}
.head .names{grid-template-columns:1fr}
.steps,.steps>tbody{display:flex;flex-direction:column;border:0!important}
.steps>tbody{border-top:1px solid var(--rule)!important;padding:.4rem 0}
.steps>colgroup{display:none}
.steps>tbody>tr{display:contents}
.steps>tbody>tr>td{display:block;border:0!important;padding:.1rem .8rem!important}
.steps>thead{position:absolute;clip-path:inset(50%);width:1px;height:1px;overflow:hidden}
.steps>tbody>tr>td.src{order:9}
.steps td:empty{display:none}
.steps>tbody>tr>td.res{text-align:left;display:flex;gap:.6rem;align-items:baseline}
.steps>tbody>tr>td.res:empty{display:none}
.res .bar{margin-left:0}
.steps td.res[data-case]::before{content:attr(data-case);font-size:8.5pt;min-width:1.2rem;font-weight:700}
.eq{overflow-x:auto;overflow-y:hidden}
.scroll{overflow:auto hidden}
}
`;
