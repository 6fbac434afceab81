import { useEffect } from "react";
import { useRevalidator } from "react-router";
import { DropPlace } from "./drop-place";
import { limitWords } from "./limit-words";
import { UploadLine } from "./upload-line";
import { useUploads } from "./use-uploads";

interface AddDrawingsProps {
  readonly orderId: string;
  readonly upload: { readonly maxBytes: number; readonly maxFiles: number };
}

/** The foot of the list of drawings: another one is dropped or picked here and joins the order. */
export function AddDrawings({ orderId, upload: limits }: AddDrawingsProps) {
  const { uploads, add, forget } = useUploads({ orderId, limits });
  const { revalidate } = useRevalidator();
  const kept = uploads.filter(({ stage }) => stage === "kept").map(({ id }) => id);
  const arrived = kept.join(" ");
  /* A file that is kept stands in the list itself from then on. */
  useEffect(() => {
    if (arrived === "") return;
    void revalidate().then(() => forget(arrived.split(" ").map(Number)));
  }, [arrived, revalidate, forget]);
  return (
    <div className="print:hidden">
      <DropPlace size="line" label="Add a drawing" words={limitWords(limits)} onFiles={add}>
        {uploads.length > 0 && (
          <ul className="w-full space-y-3">
            {uploads.map((upload) => (
              <UploadLine key={upload.id} upload={upload} />
            ))}
          </ul>
        )}
      </DropPlace>
    </div>
  );
}
