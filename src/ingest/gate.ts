/** Counts who is inside; once full, whoever enters is asked to wait until there is room. */
export function createGate(most: number): { enter(): Promise<void> | undefined; leave(count: number): void } {
  let inside = 0;
  let waiting: { promise: Promise<void>; open: () => void } | undefined;
  return {
    enter() {
      inside += 1;
      if (inside < most) return undefined;
      waiting ??= opening();
      return waiting.promise;
    },
    leave(count) {
      inside -= count;
      if (inside >= most || waiting === undefined) return;
      waiting.open();
      waiting = undefined;
    },
  };
}

function opening(): { promise: Promise<void>; open: () => void } {
  let open = () => {};
  const promise = new Promise<void>((resolve) => (open = resolve));
  return { promise, open };
}
