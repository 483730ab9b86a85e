/**
 * Pure memoisation of tables by a key that holds everything they depend on (precision, classes, exact periods); the
 * entry used longest ago is dropped first.
 */
export function memoiseByKey<Table>(limit: number): (key: string, build: () => Table) => Table {
  const known = new Map<string, Table>();
  return (key, build) => {
    const present = known.get(key);
    const table = present === undefined ? build() : present;
    known.delete(key);
    known.set(key, table);
    if (known.size > limit) {
      const oldest = known.keys().next();
      if (!oldest.done) known.delete(oldest.value);
    }
    return table;
  };
}
