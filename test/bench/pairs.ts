// Side by side measurement: two ways of the same work, in alternating order, many times, in one run.
//
// The figure is the median of the ratios of neighbours, so that a slow moment of the machine strikes both sides alike.

export interface Pair {
  readonly name: string;
  /** Work done by the product, and by the reference. Each returns a checksum of what it stored. */
  ours(): number;
  reference(): number;
  /** Relative difference of the checksums that still counts as the same work. */
  readonly tolerance: number;
  /** 15 where nothing is said; fewer for work that takes seconds. */
  readonly pairs?: number;
}

export interface Measured {
  readonly ratio: number;
  readonly ours: number;
  readonly reference: number;
}

const usualPairs = 15;

export function measure(pair: Pair): Measured {
  const timed = (work: () => number): [number, number] => {
    const start = performance.now();
    const sum = work();
    return [performance.now() - start, sum];
  };
  const pairs = pair.pairs ?? usualPairs;
  const warmUps = Math.ceil(pairs / 5);
  for (let i = 0; i < warmUps; i += 1) {
    pair.ours();
    pair.reference();
  }
  const ratios: number[] = [];
  const ours: number[] = [];
  const reference: number[] = [];
  for (let i = 0; i < pairs; i += 1) {
    const first = timed(i % 2 === 0 ? pair.ours : pair.reference);
    const second = timed(i % 2 === 0 ? pair.reference : pair.ours);
    const [mine, theirs] = i % 2 === 0 ? [first, second] : [second, first];
    const scale = Math.max(Math.abs(mine[1]), Math.abs(theirs[1]));
    if (!(Math.abs(mine[1] - theirs[1]) <= pair.tolerance * scale)) {
      throw new Error(`${pair.name}: the two sides did different work, checksums ${mine[1]} and ${theirs[1]}`);
    }
    ratios.push(mine[0] / theirs[0]);
    ours.push(mine[0]);
    reference.push(theirs[0]);
  }
  return { ratio: median(ratios), ours: median(ours), reference: median(reference) };
}

function median(values: readonly number[]): number {
  const sorted = [...values].sort((a, b) => a - b);
  return sorted[Math.floor(sorted.length / 2)]!;
}
