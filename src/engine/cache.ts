/**
 * Results kept by the content of what they were computed from. Bounded: when the sizes of what is kept
 * exceed the limit, the longest unused go first.
 */
export class ContentCache {
  readonly #kept = new Map<string, { readonly value: unknown; readonly size: number }>();
  #size = 0;

  /** @param limit characters of content, keys and values together, that may be kept */
  constructor(private readonly limit: number = 20_000_000) {}

  /** What was kept for this content, else what `compute` gives, which is then kept. A thrown error is not kept. */
  get<T>(content: string, compute: () => T): T {
    const found = this.#kept.get(content);
    if (found) {
      // a Map remembers the order of insertion: putting it in again marks it as used just now
      this.#kept.delete(content);
      this.#kept.set(content, found);
      return found.value as T;
    }
    const value = compute();
    this.#keep(content, value);
    return value;
  }

  has(content: string): boolean {
    return this.#kept.has(content);
  }

  get size(): number {
    return this.#size;
  }

  #keep(content: string, value: unknown): void {
    const size = content.length + JSON.stringify(value).length;
    if (size > this.limit) return;
    this.#kept.set(content, { value, size });
    this.#size += size;
    for (const [key, { size: freed }] of this.#kept) {
      if (this.#size <= this.limit) return;
      this.#kept.delete(key);
      this.#size -= freed;
    }
  }
}
