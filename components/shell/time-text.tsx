const INSTANT = new Intl.DateTimeFormat("en-GB", {
  dateStyle: "medium",
  timeStyle: "short",
  timeZone: "UTC",
});

/** An instant as everybody on the team reads it the same: date and time in UTC. */
export function TimeText({ at }: { at: number }) {
  return (
    <time dateTime={new Date(at).toISOString()} className="whitespace-nowrap">
      {timeText(at)}
    </time>
  );
}

export function timeText(at: number): string {
  return `${INSTANT.format(at)} UTC`;
}
