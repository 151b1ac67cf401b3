/** The report's own style: paper, ink and one column of text, readable in print. No quotes: markup escapes them. */
export const reportStyle = `
:root{--paper:#fffdf8;--ground:#f3efe6;--ink:#22252a;--soft:#625f58;--hair:#ddd5c5;--rust:#a8431d}
*{box-sizing:border-box}
body{margin:0;background:var(--ground);color:var(--ink);font:15px/1.5 Lastbed Sans,system-ui,sans-serif}
header,main{max-width:1400px;margin:0 auto;padding:24px 28px}
h1{font-size:30px;margin:0 0 6px}
h2{font-size:22px;margin:44px 0 10px;padding-top:14px;border-top:1px solid var(--hair)}
h3{font-size:16px;margin:26px 0 8px}
h4{font-size:13px;margin:18px 0 4px;color:var(--soft)}
h4.set{font-size:15px;color:var(--ink)}
nav{display:flex;flex-wrap:wrap;gap:4px 18px}
a{color:var(--rust)}
.sentence{font-family:Georgia,Times New Roman,serif;font-size:20px;line-height:1.45;max-width:40em}
.numbers{max-width:760px}
table{border-collapse:collapse;width:100%;max-width:1124px;font-size:13px;font-variant-numeric:tabular-nums}
th,td{text-align:left;vertical-align:top;padding:4px 12px 4px 0;border-bottom:1px solid var(--hair)}
th{font-weight:600}
.numbers th{font-weight:400}
.numbers .group-of-numbers{padding-top:12px;font-weight:600;color:var(--soft)}
.note,.assumes{color:var(--soft)}
.cell{overflow-wrap:anywhere;max-width:18em}
.weaknesses{list-style:none;margin:0;padding:0;max-width:62em}
.weaknesses li{padding:2px 0 2px 22px;position:relative}
.weaknesses .sign{position:absolute;left:0;color:var(--soft)}
.weaknesses .warning .sign{color:var(--rust)}
figure{margin:18px 0;width:fit-content;max-width:100%;background:var(--paper);border:1px solid var(--hair);overflow-x:auto}
figure svg{display:block;max-width:none}
figcaption{padding:10px 16px;border-top:1px solid var(--hair);font-size:13px;position:sticky;left:0}
.methods div{margin:0 0 10px}
dt{font-weight:600}
dd{margin:0;max-width:70em}
dd p{margin:2px 0 0}
.references,.columns{padding-left:18px;font-size:13px}
details{border-bottom:1px solid var(--hair);padding:8px 0}
.wide{overflow-x:auto}
.wide table{min-width:720px}
td{overflow-wrap:anywhere}
.wide td{overflow-wrap:normal}
.wide .cell{overflow-wrap:anywhere}
code{font-size:.93em;overflow-wrap:anywhere}
.short{margin:0;padding-left:20px;max-width:62em}
.short li{margin:4px 0}
.group summary{cursor:pointer;max-width:62em}
@page{size:A4;margin:14mm}
@page plate{size:A4 landscape;margin:10mm}
@media(max-width:700px){header,main{padding:16px}.numbers th,.numbers td{padding-right:8px}}
@media print{body{background:none}header,main{padding:0}nav,details:not(.group),.files{display:none}.of-section>h2{break-before:page}h2,h3,h4,.sentence{break-after:avoid}figure,tr,.weaknesses li{break-inside:avoid}figure{page:plate;margin:0;width:auto;border:0;overflow:visible}figure svg{max-width:100%;max-height:168mm;height:auto;margin:0 auto}}
`;
