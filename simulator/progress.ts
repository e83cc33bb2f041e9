const SHOWN_EVERY = 0.25;

/** Shows how far a long piece of work has come: in place on a terminal, in a few lines elsewhere. */
export function createProgress(what: string, output: NodeJS.WriteStream): (share: number) => void {
  let shown = 0;
  return (share) => {
    const text = `${what} ${Math.round(share * 100)} %`;
    if (output.isTTY) output.write(`\r${text}${share >= 1 ? '\n' : ''}`);
    else if (share >= 1 || share - shown >= SHOWN_EVERY) {
      shown = share;
      output.write(`${text}\n`);
    }
  };
}
