const HALVINGS = 30;

/**
 * The least value at which `f` reaches 1, found between the points of an ascending grid and then by halving, to
 * a billionth of the grid's step. The first grid point itself where `f` is 1 or more already there; `undefined`
 * where it stays below 1 at all of them. A rise and fall between two neighbouring points goes unseen.
 */
export function firstCrossing(grid: readonly number[], f: (value: number) => number): number | undefined {
  let below: number | undefined;
  for (const value of grid) {
    if (f(value) >= 1) return below === undefined ? value : halved(below, value, f);
    below = value;
  }
  return undefined;
}

function halved(from: number, to: number, f: (value: number) => number): number {
  let [below, reached] = [from, to];
  for (let step = 0; step < HALVINGS; step++) {
    const middle = (below + reached) / 2;
    if (f(middle) >= 1) reached = middle;
    else below = middle;
  }
  return reached;
}
