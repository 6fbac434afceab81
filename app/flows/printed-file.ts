/** A PDF made from what is written down. Printing it moves nothing. */
export interface PrintedFile {
  readonly fileName: string;
  readonly bytes: Uint8Array;
}
