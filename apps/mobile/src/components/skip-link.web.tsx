/** The first thing a keyboard meets: a way past the places to the page itself. Unseen until it has the focus. */
export function SkipLink() {
  return (
    <a
      className="skip"
      href="#main"
      onClick={(event) => {
        event.preventDefault();
        document.getElementById('main')?.focus();
      }}
    >
      Skip to the page
    </a>
  );
}
