type Plain = Readonly<Record<string, unknown>>;

function isPlain(value: unknown): value is Plain {
  return typeof value === 'object' && value !== null && !Array.isArray(value);
}

function shared(before: unknown, after: unknown): unknown {
  if (Object.is(before, after)) return before;
  if (Array.isArray(before) && Array.isArray(after)) {
    const items = after.map((item, at) => shared(before[at], item));
    return items.length === before.length && items.every((item, at) => item === before[at]) ? before : items;
  }
  if (isPlain(before) && isPlain(after)) {
    const keys = Object.keys(after);
    const entries = keys.map((key) => [key, shared(before[key], after[key])] as const);
    const same =
      keys.length === Object.keys(before).length &&
      entries.every(([key, value]) => key in before && before[key] === value);
    return same ? before : Object.fromEntries(entries);
  }
  return after;
}

/** Where things stand in the text; it changes with every keystroke above them and draws nothing. */
const places: ReadonlySet<string> = new Set([
  'span',
  'lineSpan',
  'nameSpan',
  'valueSpan',
  'headSpan',
  'insertRowAt',
  'insertGroupAt',
  'line',
]);

/** Whether two values of plain data differ in nothing but their places in the text. */
export function sameButForPlace(left: unknown, right: unknown): boolean {
  if (Object.is(left, right)) return true;
  if (Array.isArray(left) && Array.isArray(right)) {
    return left.length === right.length && left.every((item, at) => sameButForPlace(item, right[at]));
  }
  if (!isPlain(left) || !isPlain(right)) return false;
  const keys = Object.keys(right);
  return (
    keys.length === Object.keys(left).length &&
    keys.every((key) => key in left && (places.has(key) || sameButForPlace(left[key], right[key])))
  );
}

/**
 * The later value, made of the earlier one's parts wherever these are equal: what did not change keeps its identity
 * across the worker's border, and what shows it need not be drawn again. For plain data only.
 */
export function shareStructure<Value>(before: Value | null, after: Value): Value {
  // Parts are only ever exchanged for equal ones, so the type is the later value's.
  return shared(before, after) as Value;
}
