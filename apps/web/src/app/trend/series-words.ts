import type { Trend } from '@stillstroke/contract/trend';

type Series = Trend['series'][number];

const viewWords = { 'side-underwater': 'side under water', 'side-above': 'side above water' } as const;
const kindWords = { full: 'full stroke', drill: 'drill' } as const;

/** `side under water · full stroke` */
export function saySeries({ view, stroke }: Pick<Series, 'view' | 'stroke'>): string {
  return `${viewWords[view]} · ${kindWords[stroke]}`;
}
