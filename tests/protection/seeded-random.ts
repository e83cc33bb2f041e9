/** Random numbers from 0 to 1, the same for the same seed: the minimal standard generator of Park and Miller. */
export function seededRandom(seed: number): () => number {
  let state = seed;
  return () => {
    state = (state * 48_271) % 2_147_483_647;
    return state / 2_147_483_647;
  };
}
