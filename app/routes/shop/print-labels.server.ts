import { z } from "zod";
import { printPartLabels } from "~/flows/print-part-labels.server";
import { pdfResponse } from "../pdf-response.server";

/** Whatever cannot be read of the paper falls back to the printer's roll. */
const querySchema = z.object({
  paper: z.enum(["roll", "letter", "a4"]).catch("roll"),
  piece: z.array(z.string()),
});

/** The part labels that an address asks for: `paper`, and `piece` for each one wanted alone. */
export async function printLabels(
  { searchParams }: URL,
  of: { readonly orderId: string } | { readonly sheetId: string },
): Promise<Response> {
  const { paper, piece } = querySchema.parse({
    paper: searchParams.get("paper"),
    piece: searchParams.getAll("piece"),
  });
  return pdfResponse(await printPartLabels({ of, paper, pieceIds: piece.length > 0 ? piece : undefined }));
}
