/** The first stop of the Tab key: past the places, to what the page is about. */
export function SkipLink() {
  return (
    <a className="w-skip" href="#main">
      Skip to the page
    </a>
  );
}
