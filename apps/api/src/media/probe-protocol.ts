import type { ClipRefusalCode } from '@stillstroke/clip-index/clip-refusal';
import type { ClipIndex } from '@stillstroke/clip-index/frame-index';
import type { PosterWish } from './poster-wish';

/** What the server asks of the process that looks into files, one question at a time. */
export type ProbeQuestion =
  | { readonly kind: 'index'; readonly film: string }
  | ({ readonly kind: 'poster'; readonly film: string } & PosterWish)
  | { readonly kind: 'picture'; readonly picture: string; readonly made: string };

export type ProbeAnswer =
  | { readonly kind: 'index'; readonly index: ClipIndex }
  | { readonly kind: 'poster' }
  | { readonly kind: 'picture'; readonly width: number; readonly height: number }
  | { readonly kind: 'refused'; readonly code: ClipRefusalCode; readonly message: string }
  | { readonly kind: 'failed'; readonly message: string };

/** Said once when the process has loaded. */
export interface ProbeReady {
  readonly kind: 'ready';
}
