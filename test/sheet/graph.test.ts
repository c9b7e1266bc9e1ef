import { describe, expect, it } from 'vitest';
import { buildGraph } from '../../src/sheet/graph.ts';

describe('the order of calculation', () => {
  it('puts what is used before what uses it', () => {
    const graph = buildGraph([[1, 2], [2], [], [0]]);
    expect([...graph.order]).toEqual([2, 1, 0, 3]);
    expect([...graph.place]).toEqual([2, 1, 0, 3]);
    expect(graph.loops).toEqual([]);
  });

  it('lists the users of each node', () => {
    const graph = buildGraph([[2], [2], []]);
    expect([...graph.userList.subarray(graph.userStart[2]!, graph.userStart[3]!)]).toEqual([0, 1]);
  });

  it.each([
    { name: 'a node that uses itself', uses: [[0]], loop: [0] },
    { name: 'two nodes that use each other', uses: [[1], [0]], loop: [0, 1] },
    { name: 'the short way round where there are two', uses: [[1, 2], [2], [3], [0]], loop: [0, 2, 3] },
  ])('finds a loop: $name', ({ uses, loop }) => {
    expect(buildGraph(uses).loops).toEqual([loop]);
  });

  it('keeps a node downstream of a loop out of the loop', () => {
    const graph = buildGraph([[1], [0], [0]]);
    expect([...graph.loopOf]).toEqual([0, 0, -1]);
    expect(graph.place[2]).toBe(2);
  });

  it('orders a chain of 200 000 nodes written upside down, without recursion', () => {
    const n = 200_000;
    const graph = buildGraph(Array.from({ length: n }, (_, i) => (i + 1 < n ? [i + 1] : [])));
    expect(graph.order[0]).toBe(n - 1);
    expect(graph.order[n - 1]).toBe(0);
  });

  it('finds one loop through 100 000 nodes', () => {
    const n = 100_000;
    const graph = buildGraph(Array.from({ length: n }, (_, i) => [(i + 1) % n]));
    expect(graph.loops).toHaveLength(1);
    expect(graph.loops[0]).toHaveLength(n);
  });
});
