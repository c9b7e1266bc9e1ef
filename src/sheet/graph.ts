// The order of calculation: who uses whom, what comes first, and which definitions run in a circle.
//
// 1. `order` lists every node once; a node stands after all nodes that it uses, except within a loop.
// 2. No recursion: a chain of 50 000 definitions is ordinary input (Tarjan 1972, strongly connected components, with an own stack).
// 3. `users` is the same graph turned round, in compressed rows, so that a walk downstream allocates nothing.
// Not here: names, cells, values; nodes are numbers.

export interface Graph {
  /** Nodes, those used before those that use them. */
  readonly order: Int32Array;
  /** Place of each node in `order`. */
  readonly place: Int32Array;
  /** Loop of each node: its number in `loops`, or -1. */
  readonly loopOf: Int32Array;
  /** One closed path for each loop, first node not repeated. */
  readonly loops: readonly (readonly number[])[];
  /** Users of node i: userList[userStart[i]] … userList[userStart[i + 1] - 1]. */
  readonly userStart: Int32Array;
  readonly userList: Int32Array;
}

/** `uses[i]` lists the nodes that node i uses, without repeats. */
export function buildGraph(uses: readonly (readonly number[])[]): Graph {
  const n = uses.length;
  const userStart = new Int32Array(n + 1);
  for (const list of uses) for (const used of list) userStart[used + 1]! += 1;
  for (let i = 0; i < n; i += 1) userStart[i + 1]! += userStart[i]!;
  const fill = userStart.slice(0, n);
  const userList = new Int32Array(userStart[n]!);
  for (let i = 0; i < n; i += 1) for (const used of uses[i]!) userList[fill[used]!++] = i;

  const order = new Int32Array(n);
  const place = new Int32Array(n);
  const loopOf = new Int32Array(n).fill(-1);
  const loops: number[][] = [];
  const visit = new Int32Array(n); // 0 unseen, else visiting number from 1
  const low = new Int32Array(n);
  const next = new Int32Array(n); // next edge to walk
  const onStack = new Uint8Array(n);
  const stack: number[] = [];
  const path: number[] = [];
  let counter = 0;
  let placed = 0;

  for (let root = 0; root < n; root += 1) {
    if (visit[root] !== 0) continue;
    path.push(root);
    while (path.length > 0) {
      const node = path[path.length - 1]!;
      if (visit[node] === 0) {
        counter += 1;
        visit[node] = counter;
        low[node] = counter;
        stack.push(node);
        onStack[node] = 1;
      }
      const edges = uses[node]!;
      let descended = false;
      while (next[node]! < edges.length) {
        const used = edges[next[node]!]!;
        next[node]! += 1;
        if (visit[used] === 0) {
          path.push(used);
          descended = true;
          break;
        }
        if (onStack[used] === 1 && visit[used]! < low[node]!) low[node] = visit[used]!;
      }
      if (descended) continue;
      path.pop();
      const parent = path[path.length - 1];
      if (parent !== undefined && low[node]! < low[parent]!) low[parent] = low[node]!;
      if (low[node] !== visit[node]) continue;
      const members: number[] = [];
      for (;;) {
        const member = stack.pop()!;
        onStack[member] = 0;
        members.push(member);
        if (member === node) break;
      }
      if (members.length > 1 || edges.includes(node)) {
        for (const member of members) loopOf[member] = loops.length;
        loops.push(shortestLoop(Math.min(...members.slice(0, 10_000)), uses, new Set(members)));
      }
      members.sort((a, b) => a - b);
      for (const member of members) {
        place[member] = placed;
        order[placed] = member;
        placed += 1;
      }
    }
  }
  return { order, place, loopOf, loops, userStart, userList };
}

/** Breadth first from `start` back to `start`, within the members of its component. */
function shortestLoop(start: number, uses: readonly (readonly number[])[], members: ReadonlySet<number>): number[] {
  const cameFrom = new Map<number, number>();
  const queue = [start];
  for (let head = 0; head < queue.length; head += 1) {
    const node = queue[head]!;
    for (const used of uses[node]!) {
      if (used === start) {
        const back: number[] = [node];
        while (back[back.length - 1] !== start) back.push(cameFrom.get(back[back.length - 1]!)!);
        return back.reverse();
      }
      if (members.has(used) && !cameFrom.has(used)) {
        cameFrom.set(used, node);
        queue.push(used);
      }
    }
  }
  return [start];
}
