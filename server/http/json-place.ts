/** Line and column of what the JSON parser stumbled over, from its message and the text it read. */
export function placeInJson(parserMessage: string, text: string): { message: string; limit: string } {
  const found = /position (\d+)/.exec(parserMessage)?.[1];
  const position = found === undefined ? firstFault(parserMessage, text) : Number(found);
  const before = text.slice(0, position).split('\n');
  const place = `line ${before.length}, column ${(before.at(-1) ?? '').length + 1}`;
  const character = text[position];
  const what =
    character === undefined
      ? 'The text ends before the JSON is complete'
      : `${JSON.stringify(character)} is not expected here`;
  return { message: `${what}: ${place}, position ${position}.`, limit: 'JSON (RFC 8259)' };
}

/** Without a position the text either ended early, or its first character is at fault (a bare value, which is refused). */
const firstFault = (parserMessage: string, text: string): number =>
  /end of JSON/i.test(parserMessage) ? text.length : Math.max(0, text.search(/\S/));
