/** Why nothing here can be typed in. */
export function ReadOnlyNote() {
  return (
    <p className="mb-5 border-l-4 border-ink-soft pl-4 text-ink-soft">
      You can read this. A lead of your site can change it.
    </p>
  );
}
