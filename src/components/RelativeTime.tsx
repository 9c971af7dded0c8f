/** Times as people say them: `12 s ago`, `yesterday`, `14 May`; the exact time on hovering. */
import { useSyncExternalStore } from 'react';

const SECOND = 1000;
const MINUTE = 60 * SECOND;
const HOUR = 60 * MINUTE;
const DAY = 24 * HOUR;

const thisYear = new Intl.DateTimeFormat('en-GB', { day: 'numeric', month: 'short' });
const otherYear = new Intl.DateTimeFormat('en-GB', {
  day: 'numeric',
  month: 'short',
  year: 'numeric',
});
const exact = new Intl.DateTimeFormat('en-GB', { dateStyle: 'long', timeStyle: 'short' });

/** `14 May`, with the year where it is another. */
export function formatDate(at: Date, now: Date = new Date()): string {
  return (at.getFullYear() === now.getFullYear() ? thisYear : otherYear).format(at);
}

/** How long ago, up to a day; then the date. */
export function formatRelative(at: Date, now: Date): string {
  const age = now.getTime() - at.getTime();
  if (age < 5 * SECOND) return 'just now';
  if (age < MINUTE) return `${Math.floor(age / SECOND)} s ago`;
  if (age < HOUR) return `${Math.floor(age / MINUTE)} min ago`;
  if (age < DAY) return `${Math.floor(age / HOUR)} h ago`;
  if (age < 2 * DAY) return 'yesterday';
  return formatDate(at, now);
}

/** One clock for all times on the page. */
const listeners = new Set<() => void>();
let tick = Date.now();
let timer: ReturnType<typeof setInterval> | undefined;

function subscribe(listener: () => void): () => void {
  if (listeners.size === 0) {
    tick = Date.now();
    timer = setInterval(() => {
      tick = Date.now();
      for (const each of listeners) each();
    }, 5 * SECOND);
  }
  listeners.add(listener);
  return () => {
    listeners.delete(listener);
    if (listeners.size === 0) clearInterval(timer);
  };
}

export function RelativeTime({
  at,
  style = 'relative',
}: {
  /** ISO 8601. */
  readonly at: string;
  readonly style?: 'relative' | 'date';
}) {
  const now = useSyncExternalStore(subscribe, () => tick);
  const date = new Date(at);
  if (Number.isNaN(date.getTime())) return null;
  return (
    <time dateTime={at} title={exact.format(date)} className="whitespace-nowrap">
      {style === 'date'
        ? formatDate(date)
        : formatRelative(date, new Date(Math.max(now, date.getTime())))}
    </time>
  );
}
