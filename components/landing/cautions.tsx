/** What no result of this tool is; shown wherever results leave it. */
export function Cautions() {
  return (
    <footer className="border-rule-line border-t py-4">
      <p className="text-ink-soft max-w-[90ch] text-xs">
        Results are engineering estimates. The fabricator&rsquo;s process, the laminate&rsquo;s data sheet and
        measurement on coupons decide; no result replaces the review of a qualified engineer or a standard
        that the design must meet.
      </p>
    </footer>
  );
}
