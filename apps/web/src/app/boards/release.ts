const dayMs = 86_400_000;

/** Whole days from today to a date written as 2026-05-31; negative once it has passed. */
export function daysTo(date: string, now: Date): number {
  const [year, month, day] = date.split('-').map(Number) as [number, number, number];
  const today = Date.UTC(now.getFullYear(), now.getMonth(), now.getDate());
  return Math.round((Date.UTC(year, month - 1, day) - today) / dayMs);
}

/** "13 days to go", "today", "4 days over"; of something passed "4 days ago". */
export function daysWords(days: number, passed = false): string {
  if (days === 0) return 'today';
  const count = `${Math.abs(days)} ${Math.abs(days) === 1 ? 'day' : 'days'}`;
  return days > 0 ? `${count} to go` : `${count} ${passed ? 'ago' : 'over'}`;
}
