/** A picture of the gallery. */
export interface Picture {
  /** Heading it stands under. */
  readonly group: string;
  /** Path of the PNG. */
  readonly file: string;
  /** What a click opens. */
  readonly link: string;
}
