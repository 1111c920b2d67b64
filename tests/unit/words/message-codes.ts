import ts from "typescript";

function nodesIn(path: string, text: string): ts.Node[] {
  const source = ts.createSourceFile(path, text, ts.ScriptTarget.Latest, true);
  const nodes: ts.Node[] = [];
  const visit = (node: ts.Node): void => {
    nodes.push(node);
    ts.forEachChild(node, visit);
  };
  visit(source);
  return nodes;
}

/** The last text written out among the arguments of each call of a method whose name fits. */
const textsHandedTo = (nodes: readonly ts.Node[], method: RegExp): string[] =>
  nodes
    .flatMap((node) => {
      if (!ts.isCallExpression(node) || !ts.isPropertyAccessExpression(node.expression)) return [];
      if (!method.test(node.expression.name.text)) return [];
      return node.arguments.filter((one) => ts.isStringLiteral(one)).slice(-1);
    })
    .map(({ text }) => text);

/** Codes that shapes name for their sentence: the text handed to a check of the schema library, or its `message`. */
export function shapeCodesIn(path: string, text: string): string[] {
  const nodes = nodesIn(path, text);
  const messages = nodes.flatMap((node) =>
    ts.isPropertyAssignment(node) && node.name.getText() === "message" && ts.isStringLiteral(node.initializer)
      ? [node.initializer.text]
      : [],
  );
  return [...textsHandedTo(nodes, /^(min|max|regex|refine|enum|custom|email|length|int)$/u), ...messages];
}

/** Codes of the problems a reader adds to its list. */
export const problemCodesIn = (path: string, text: string): string[] =>
  textsHandedTo(nodesIn(path, text), /^add$/u);
