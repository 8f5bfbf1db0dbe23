const SPACE = /[ \t\r\n]*/y;
// biome-ignore lint/suspicious/noControlCharactersInRegex: RFC 8259 forbids them unescaped, so they are what we look for
const STRING = /"(?:[^"\\\u0000-\u001f]|\\(?:["\\/bfnrt]|u[0-9a-fA-F]{4}))*"/y;
const NUMBER = /-?(?:0|[1-9]\d*)(?:\.\d+)?(?:[eE][+-]?\d+)?/y;
const WORD = /true|false|null/y;

/**
 * Where a text stops being JSON: the offset of the first character that the grammar does not allow, or −1 for sound JSON.
 * Engines word their own messages differently and some leave the place out, so we look ourselves, once a parse has failed.
 * @see RFC 8259
 */
export function jsonFaultAt(text: string): number {
  let at = 0;
  const take = (pattern: RegExp): boolean => {
    pattern.lastIndex = at;
    if (!pattern.test(text)) return false;
    at = pattern.lastIndex;
    return true;
  };
  const takeChar = (char: string): boolean => {
    take(SPACE);
    if (text[at] !== char) return false;
    at++;
    return true;
  };
  const key = (): boolean => {
    take(SPACE);
    return take(STRING) && takeChar(':');
  };
  // What is open, innermost last; a loop and not recursion, so that hostile nesting cannot exhaust the stack.
  const open: ('{' | '[')[] = [];
  for (;;) {
    if (takeChar('{')) {
      if (!takeChar('}')) {
        open.push('{');
        if (!key()) return at;
        continue;
      }
    } else if (takeChar('[')) {
      if (!takeChar(']')) {
        open.push('[');
        continue;
      }
    } else if (!take(STRING) && !take(NUMBER) && !take(WORD)) return at;
    for (;;) {
      const inside = open.at(-1);
      if (inside === undefined) {
        take(SPACE);
        return at === text.length ? -1 : at;
      }
      if (takeChar(',')) {
        if (inside === '{' && !key()) return at;
        break;
      }
      if (!takeChar(inside === '{' ? '}' : ']')) return at;
      open.pop();
    }
  }
}

/** An offset as people count it: `line 3, column 14`. */
export function lineAndColumn(text: string, offset: number): string {
  const before = text.slice(0, offset);
  return `line ${before.split('\n').length}, column ${before.length - before.lastIndexOf('\n')}`;
}
