import type { MouseEvent } from 'react';

/** Takes a link's click over, unless it asks for a tab or window of its own. */
export const plainClick =
  (act: () => void) =>
  (event: MouseEvent): void => {
    if (event.button !== 0 || event.metaKey || event.ctrlKey || event.shiftKey || event.altKey) return;
    event.preventDefault();
    act();
  };
