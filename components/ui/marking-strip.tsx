/** The highest marking of what a page is made from. On screen above the page, on paper at the head of every sheet. */
export function MarkingStrip({ marking }: { readonly marking: string }) {
  return (
    <div role="note" aria-label="Marking" className="marking-strip">
      <p className="border-b border-ink-2 bg-ink px-6 py-0.5 text-center text-note font-semibold wrap-anywhere text-paper">
        {marking}
      </p>
    </div>
  );
}
