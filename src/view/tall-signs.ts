// Tall brackets and braces under a policy without inline styles.
//
// KaTeX gives the drawing of a tall sign its width as a `style` attribute, which such a policy blocks and reports. Here the same style is set
// through the document's interface, as KaTeX does everywhere else. Not here: everything else about formulas (math.ts).

import katex from 'katex';

interface SvgNode {
  readonly attributes: Record<string, string>;
  toNode(): SVGElement;
}

/** To be called once, before the first formula. */
export function allowTallSigns() {
  const { SvgNode } = (katex as unknown as { readonly __domTree: { readonly SvgNode: { readonly prototype: SvgNode } } })
    .__domTree;
  const draw = SvgNode.prototype.toNode;
  SvgNode.prototype.toNode = function (this: SvgNode) {
    const { style, ...attributes } = this.attributes;
    const node = draw.call(Object.assign(Object.create(SvgNode.prototype), this, { attributes }) as SvgNode);
    if (style !== undefined) node.style.cssText = style;
    return node;
  };
}
