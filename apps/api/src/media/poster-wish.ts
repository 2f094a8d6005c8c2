/** A poster to be made. */
export interface PosterWish {
  /** Where to write the JPEG. */
  readonly poster: string;
  /** Microseconds of file time, the frame wished for first; where it cannot be decoded, the next is tried. */
  readonly atUs: readonly number[];
  /** Size of the picture as shown. */
  readonly width: number;
  readonly height: number;
}
