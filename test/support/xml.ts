/** One element of a document that is known to be plain: no CDATA, no text that matters beside elements. */
export interface Element {
  readonly name: string;
  readonly attributes: Readonly<Record<string, string>>;
  readonly children: Element[];
  text: string;
}

const TAG = /<(\/?)([\w:.]+)((?:\s+[\w:.]+="[^"]*")*)\s*(\/?)>([^<]*)/g;
const ATTRIBUTE = /([\w:.]+)="([^"]*)"/g;

const NAMED: Readonly<Record<string, string>> = { amp: "&", lt: "<", gt: ">", quot: '"', apos: "'" };
const unescaped = (text: string): string => text.replace(/&(\w+);/g, (_, name: string) => NAMED[name]);

/** Reads a manifest into elements; whether it is well formed is for the schema to say. */
export function readXml(xml: string): Element {
  const document: Element = { name: "", attributes: {}, children: [], text: "" };
  const open = [document];
  for (const [, closing, name, attributes, empty, text] of xml.replace(/<!--.*?-->/gs, "").matchAll(TAG)) {
    if (closing) {
      open.pop();
      continue;
    }
    const element: Element = {
      name,
      attributes: Object.fromEntries(
        [...attributes.matchAll(ATTRIBUTE)].map(([, key, value]) => [key, unescaped(value)]),
      ),
      children: [],
      text: unescaped(text.trim()),
    };
    open[open.length - 1].children.push(element);
    if (!empty) open.push(element);
  }
  return document.children[0];
}

/** An element and all below it, in the order of the document. */
export const everyElement = (element: Element): Element[] => [
  element,
  ...element.children.flatMap(everyElement),
];

/** The elements that a path of names leads to. */
export const under = (element: Element, ...path: string[]): Element[] =>
  path.reduce((found, name) => found.flatMap((e) => e.children.filter((c) => c.name === name)), [element]);
