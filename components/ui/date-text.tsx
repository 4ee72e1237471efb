const DAY = new Intl.DateTimeFormat('en-GB', { day: 'numeric', month: 'short', year: 'numeric', timeZone: 'UTC' });
const MINUTE = new Intl.DateTimeFormat('en-GB', { day: 'numeric', month: 'short', year: 'numeric', hour: '2-digit', minute: '2-digit', timeZone: 'UTC' });

/** A day, or with `withTime` a minute, in UTC: the same on the server and in every browser. */
export function DateText({ date, withTime = false }: { readonly date: Date; readonly withTime?: boolean }) {
  return (
    <time dateTime={date.toISOString()} className="whitespace-nowrap">
      {withTime ? `${MINUTE.format(date)} UTC` : DAY.format(date)}
    </time>
  );
}
