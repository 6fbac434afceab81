import trouble from "./trouble.worker";

/** In place of the reader: behaves as a comment in the file says. */
export default function troubleReading({ bytes }: { bytes: Uint8Array }): Promise<unknown> {
  const [, how] = new TextDecoder().decode(bytes).match(/^999\ntrouble: (\w+)$/m) ?? [];
  return trouble(how ?? "unsaid");
}
