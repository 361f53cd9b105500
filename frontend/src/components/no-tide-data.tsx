/** What stands where no prediction covers the day: words over a dashed line. */
export function NoTideData() {
  return (
    <p className="border-b border-dashed border-edge py-4 text-ui">No tide data for this day.</p>
  );
}
