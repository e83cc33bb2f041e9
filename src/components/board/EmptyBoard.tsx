/** A network without lines: what a new installation shows until somebody fills the register. */
export function EmptyBoard({ mayEditRegister }: { mayEditRegister: boolean }) {
  return (
    <div className="max-w-[60ch]">
      <h1 className="text-sentence font-medium text-balance">The register has no lines yet.</h1>
      <p className="mt-3 text-lead text-ink-2">
        {mayEditRegister
          ? 'Add a line with its terminals and recorded settings, and it appears here with the first measurement.'
          : 'An engineer or an admin adds them on the Register page. A line appears here with its first measurement.'}
      </p>
      {mayEditRegister && (
        <p className="mt-5">
          <a href="/register" className="button">
            Open the register
          </a>
        </p>
      )}
    </div>
  );
}
