/**
 * Pure memoisation with a bounded number of entries: the value depends on the key alone, so forgetting one costs time only.
 * Once it is full, the entry used longest ago since then is dropped first.
 */
export function memoiseBounded<Key extends number | string, Value extends object | bigint>(
  limit: number,
  compute: (key: Key) => Value,
): (key: Key) => Value {
  const known = new Map<Key, Value>();
  let lastKey: Key | undefined;
  let lastValue: Value | undefined;
  return (key) => {
    if (key === lastKey && lastValue !== undefined) return lastValue;
    let value = known.get(key);
    if (value === undefined) {
      value = compute(key);
      if (known.size >= limit) {
        const oldest = known.keys().next();
        if (!oldest.done) known.delete(oldest.value);
      }
      known.set(key, value);
    } else if (known.size >= limit) {
      // Only a full memory needs to know what was used last.
      known.delete(key);
      known.set(key, value);
    }
    lastKey = key;
    lastValue = value;
    return value;
  };
}
