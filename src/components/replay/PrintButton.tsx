/** Opens the browser's own print dialogue. */
export function PrintButton() {
  return (
    <button type="button" className="button button-first" onClick={() => window.print()}>
      Print
    </button>
  );
}
