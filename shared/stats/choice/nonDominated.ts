/** A point with its objectives (all to be maximised) and whatever belongs to it. */
export interface Tradable<T> {
  readonly objectives: Float64Array;
  readonly of: T;
}

function dominates(a: Float64Array, b: Float64Array): boolean {
  let isBetter = false;
  for (let i = 0; i < a.length; i++) {
    if (a[i]! < b[i]!) return false;
    if (a[i]! > b[i]!) isBetter = true;
  }
  return isBetter;
}

/**
 * Collects the points that no other beats in every objective. Whoever dominated last is asked first, so
 * that most points are turned away after one comparison.
 */
export class Front<T> {
  private readonly members: Tradable<T>[] = [];

  get size(): number {
    return this.members.length;
  }

  /** @returns whether the point is (for now) on the front. `make` is called only then. */
  offer(objectives: Float64Array, make: () => T): boolean {
    const { members } = this;
    for (let i = 0; i < members.length; i++) {
      if (!dominates(members[i]!.objectives, objectives)) continue;
      if (i > 0) [members[0], members[i]] = [members[i]!, members[0]!];
      return false;
    }
    let kept = 0;
    for (const member of members)
      if (!dominates(objectives, member.objectives)) members[kept++] = member;
    members.length = kept;
    members.push({ objectives: objectives.slice(), of: make() });
    return true;
  }

  /** At most `most` of the members, spread evenly along the first objective. */
  take(most: number): T[] {
    const sorted = [...this.members].sort((a, b) => a.objectives[0]! - b.objectives[0]!);
    if (sorted.length <= most) return sorted.map(({ of }) => of);
    return Array.from(
      { length: most },
      (_, i) => sorted[Math.round((i * (sorted.length - 1)) / (most - 1))]!.of,
    );
  }
}
