// The page begins: faces and styles, our elements, and the finished example on the desk.

import '@fontsource-variable/atkinson-hyperlegible-next';
import 'katex/dist/katex.min.css';
import './page.css';
import './edit/edit.css';
import './sheet.css';
import './head.css';
import './lines.css';
import './table/table.css';
import './print.css';
import { readSheet } from '../sheet/index.ts';
import exampleText from './example.sheet.json?raw';
import { HereElement } from './here.ts';
import { loadEditing } from './in-place.ts';
import { MathElement } from './math.ts';
import { BarElement } from './outline.ts';
import { PageElementRoot } from './page.ts';
import { PaperElement } from './paper.ts';
import { RowElement } from './row.ts';
import { startSession } from './session.ts';
import { loadShelf } from './shelf-load.ts';
import { loadTemplates } from './template-load.ts';

customElements.define('ts-math', MathElement);
customElements.define('ts-bar', BarElement);
customElements.define('ts-here', HereElement);
customElements.define('ts-row', RowElement);
customElements.define('ts-paper', PaperElement);
customElements.define('ts-page', PageElementRoot);

const example = readSheet(exampleText);
// The example is part of the product and tested: one that cannot be read is a fault of ours.
if (!example.ok) throw new Error(example.problems.map((problem) => problem.message).join('\n'));
const page = document.querySelector<PageElementRoot>('ts-page');
if (page !== null) page.session = startSession(example.value);
// All faces at once, so that nothing is asked of the network later, on the first formula that needs one.
for (const face of document.fonts) void face.load();
// The editing pieces come behind the first screen, before anybody can have reached a line.
requestAnimationFrame(() =>
  setTimeout(() => {
    performance.mark('first screen');
    void loadEditing().catch(() => undefined);
    void loadShelf();
    void loadTemplates();
  }),
);
