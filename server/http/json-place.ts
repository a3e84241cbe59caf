// White space, then a mark, a string, or a number or word.
const token =
  // eslint-disable-next-line no-control-regex -- control characters are what a JSON string may not hold
  /[ \t\n\r]*(?:([{}[\],:])|("(?:[^"\\\u0000-\u001f]|\\(?:["\\/bfnrt]|u[\da-fA-F]{4}))*")|(?:-?(?:0|[1-9]\d*)(?:\.\d+)?(?:[eE][+-]?\d+)?|true|false|null))/y;

type Expected = 'value' | 'value or ]' | 'key' | 'key or }' | ':' | 'next or end' | 'nothing more';

/**
 * Where JSON text goes wrong first: the parser's own messages name a position only for some faults. The end of the text
 * where it breaks off. Works without recursion, so that nesting cannot exhaust the stack.
 */
export function firstFault(text: string): number {
  const open: ('{' | '[')[] = [];
  let expected: Expected = 'value';
  let position = 0;
  const closed = (): Expected => (open.length === 0 ? 'nothing more' : 'next or end');
  for (;;) {
    token.lastIndex = position;
    const found = token.exec(text);
    if (found === null || expected === 'nothing more') return afterSpace(text, position);
    const mark = found[1];
    const isString = found[2] !== undefined;
    const isValue = expected === 'value' || expected === 'value or ]';
    const isKey = expected === 'key' || expected === 'key or }';
    if (isValue && (mark === '{' || mark === '[')) {
      open.push(mark);
      expected = mark === '{' ? 'key or }' : 'value or ]';
    } else if (isValue && mark === undefined) {
      expected = closed();
    } else if (isKey && isString) {
      expected = ':';
    } else if (expected === ':' && mark === ':') {
      expected = 'value';
    } else if (expected === 'next or end' && mark === ',') {
      expected = open.at(-1) === '{' ? 'key' : 'value';
    } else if (
      (mark === '}' && open.at(-1) === '{' && (expected === 'key or }' || expected === 'next or end')) ||
      (mark === ']' && open.at(-1) === '[' && (expected === 'value or ]' || expected === 'next or end'))
    ) {
      open.pop();
      expected = closed();
    } else {
      return afterSpace(text, position);
    }
    position = token.lastIndex;
  }
}

function afterSpace(text: string, from: number): number {
  let position = from;
  while (' \t\n\r'.includes(text[position] ?? 'end')) position += 1;
  return position;
}

/** In words: what stands where the text goes wrong, with line and column. */
export function placeInJson(text: string): string {
  const fault = firstFault(text);
  // Valid in itself: then it is a bare value, which is refused, and its beginning is what was not expected.
  const position = fault === text.length && isBareValue(text) ? text.search(/\S/) : fault;
  const before = text.slice(0, position).split('\n');
  const place = `line ${before.length}, column ${(before.at(-1) ?? '').length + 1}, position ${position}`;
  const character = text.slice(position, position + 1);
  return character === '' ? `The text ends too early: ${place}.` : `“${character}” is not expected here: ${place}.`;
}

function isBareValue(text: string): boolean {
  return /^\s*[^[{\s]/.test(text);
}
