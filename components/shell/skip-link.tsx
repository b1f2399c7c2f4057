/** First stop of the Tab key on every page. */
export function SkipLink() {
  return (
    <a
      href="#main"
      className="absolute top-2 left-2 z-50 -translate-y-20 rounded bg-ink px-4 py-2 font-semibold text-paper focus:translate-y-0"
    >
      Skip to the content
    </a>
  );
}
