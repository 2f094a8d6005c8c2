import type { DraftFinding } from '../draft/draft-review';

/** What a draft still needs before it can be sent, in sentences; the server asks for the same. */
export function whatIsMissing(findings: readonly DraftFinding[]): readonly string[] {
  if (findings.length === 0) return ['Write at least one finding.'];
  const empty = findings.flatMap(({ fields }, at) => (fields.words.trim() === '' ? [at + 1] : []));
  return [
    ...(empty.length === 1 ? [`Finding ${empty[0] ?? ''} has no words yet.`] : []),
    ...(empty.length > 1 ? [`Findings ${empty.join(', ')} have no words yet.`] : []),
    ...(findings.some(({ known }) => known.mainFocus)
      ? []
      : ['Choose the one finding that is the main focus.']),
  ];
}
