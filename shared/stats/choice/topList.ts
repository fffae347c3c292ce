/** The best so many of a stream of scored items, kept as a heap with the worst on top. */
export class TopList<T> {
  private readonly heap: { score: number; item: T }[] = [];

  constructor(private readonly most: number) {}

  /** What a newcomer has to beat; −Infinity while there is room. */
  get bar(): number {
    return this.heap.length < this.most ? -Infinity : this.heap[0]!.score;
  }

  /** Keeps the item when its score beats the bar; `make` is called only then. */
  offer(score: number, make: () => T): void {
    if (score <= this.bar) return;
    const entry = { score, item: make() };
    const { heap } = this;
    if (heap.length < this.most) {
      heap.push(entry);
      this.rise(heap.length - 1);
    } else {
      heap[0] = entry;
      this.sink(0);
    }
  }

  private rise(from: number): void {
    const { heap } = this;
    for (let i = from; i > 0;) {
      const parent = (i - 1) >> 1;
      if (heap[parent]!.score <= heap[i]!.score) return;
      [heap[parent], heap[i]] = [heap[i]!, heap[parent]!];
      i = parent;
    }
  }

  private sink(from: number): void {
    const { heap } = this;
    for (let i = from; ;) {
      let smallest = i;
      for (const child of [2 * i + 1, 2 * i + 2])
        if (child < heap.length && heap[child]!.score < heap[smallest]!.score) smallest = child;
      if (smallest === i) return;
      [heap[smallest], heap[i]] = [heap[i]!, heap[smallest]!];
      i = smallest;
    }
  }

  /** Best first. */
  sorted(): { score: number; item: T }[] {
    return [...this.heap].sort((a, b) => b.score - a.score);
  }
}
