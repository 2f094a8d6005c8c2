/**
 * Whether an error says that a unique index refused a row. The code sits on the error or, where the ORM has wrapped it,
 * on its cause.
 */
export function isUniqueViolation(error: unknown): boolean {
  for (let at = error; at instanceof Error; at = at.cause) {
    const { code } = at as { code?: unknown };
    if (code === 'SQLITE_CONSTRAINT_UNIQUE' || code === 'SQLITE_CONSTRAINT_PRIMARYKEY') return true;
  }
  return false;
}
