const LOOK_EVERY_MS = 25;

/** Waits until a question has an answer, asking it again and again; fails with the last word when time runs out. */
export async function until<T>(
  question: () => T | undefined | false | Promise<T | undefined | false>,
  withinMs: number,
  whatFor: string | (() => string) = 'what was waited for',
): Promise<T> {
  const deadlineMs = Date.now() + withinMs;
  for (;;) {
    const answer = await question();
    if (answer !== undefined && answer !== false) return answer;
    if (Date.now() > deadlineMs)
      throw new Error(
        `Within ${withinMs} ms there was no ${typeof whatFor === 'string' ? whatFor : whatFor()}.`,
      );
    await new Promise((resolve) => setTimeout(resolve, LOOK_EVERY_MS));
  }
}
