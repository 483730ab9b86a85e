export interface Numbered<Item> {
  /** The item's name and which of that name it is: stays the same when others come or go. */
  readonly key: string;
  readonly item: Item;
  readonly at: number;
}

/** Items with keys of their own, also where two of them bear the same name. */
export function numbered<Item>(items: readonly Item[], nameOf: (item: Item) => string): readonly Numbered<Item>[] {
  const seen = new Map<string, number>();
  return items.map((item, at) => {
    const name = nameOf(item);
    const count = seen.get(name) ?? 0;
    seen.set(name, count + 1);
    return { key: `${name} ${count}`, item, at };
  });
}
