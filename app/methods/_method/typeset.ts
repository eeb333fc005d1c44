/** LaTeX as HTML with MathML beside it for assistive technology, made on the server: no script comes with it. */
import katex from 'katex';

/** `strict` refuses what only some typesetters take; the pages take it, the tests do not. */
export function typeset(latex: string, { display = false, strict = false }: { readonly display?: boolean; readonly strict?: boolean } = {}): string {
  return katex.renderToString(latex, {
    displayMode: display,
    fleqn: true,
    output: 'htmlAndMathml',
    throwOnError: strict,
    strict: strict ? 'error' : 'ignore',
    // Written where the formula cannot be set.
    errorColor: 'currentColor',
    trust: false,
  });
}

/** A formula at its wide spaces, so that its parts can stand under one another on a narrow screen. A space within braces or an environment parts nothing. */
export function partsOf(formula: string): string[] {
  const parts = [''];
  let depth = 0;
  for (const [token] of formula.matchAll(/\\begin\b|\\end\b|\\left\b|\\right\b|\\qquad\b|\\[\s\S]|[\s\S]/g)) {
    if (token === '\\qquad' && depth === 0) {
      parts.push('');
      continue;
    }
    if (token === '{' || token === '\\begin' || token === '\\left') depth++;
    if (token === '}' || token === '\\end' || token === '\\right') depth--;
    parts[parts.length - 1] += token;
  }
  // The comma before a wide space has done its work.
  return parts.map((part, index) => (index < parts.length - 1 ? part.trim().replace(/,$/, '') : part.trim())).filter(Boolean);
}
