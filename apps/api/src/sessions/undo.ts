import type { Settings } from '../platform/settings';

type UndoSettings = Pick<Settings, 'undoMinutes'>;

/** The instant (ISO 8601 UTC) until which a deletion made at an instant can be undone. */
export function undoUntil({ undoMinutes }: UndoSettings, deletedAt: string): string {
  return new Date(Date.parse(deletedAt) + undoMinutes * 60_000).toISOString();
}

/** What was deleted at this instant (ISO 8601 UTC) or before can no longer be brought back. */
export function undoCutoff({ undoMinutes }: UndoSettings, now: Date): string {
  return new Date(now.getTime() - undoMinutes * 60_000).toISOString();
}
