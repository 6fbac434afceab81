import { type DragEvent, type ReactNode, useId, useState } from "react";
import { buttonLook } from "../button-look";

interface DropPlaceProps {
  readonly onFiles: (files: readonly File[]) => void;
  /** As large as the sheet, or a line at the foot of a list. */
  readonly size: "sheet" | "line";
  readonly label: string;
  /** Picking a file is the one act of the page. */
  readonly primary?: boolean;
  /** What may be dropped, with its limits. */
  readonly words: ReactNode;
  readonly children?: ReactNode;
}

/** A place where drawings are dropped or picked; the picker is a real file input, so that every key and reader works. */
export function DropPlace({ onFiles, size, label, primary = false, words, children }: DropPlaceProps) {
  const [over, setOver] = useState(false);
  const id = useId();
  const drop = (event: DragEvent) => {
    event.preventDefault();
    setOver(false);
    onFiles([...event.dataTransfer.files]);
  };
  const large = size === "sheet";
  return (
    // biome-ignore lint/a11y/noStaticElementInteractions: dropping is a second way to the file input inside, which takes the keys
    <div
      onDragOver={(event) => {
        event.preventDefault();
        setOver(true);
      }}
      onDragLeave={() => setOver(false)}
      onDrop={drop}
      className={`flex flex-col items-center justify-center gap-4 text-center ${over ? "bg-blue-wash" : "bg-sheet"} ${
        large
          ? "min-h-[58dvh] rounded-sheet border border-dashed border-edge px-4 py-10 sm:px-8"
          : "gap-2 px-4 py-5 sm:px-6"
      }`}
    >
      {children}
      <div>
        <input
          id={id}
          type="file"
          multiple
          accept=".dxf,image/vnd.dxf,application/dxf"
          aria-describedby={`${id}-words`}
          className="peer sr-only"
          onChange={(event) => {
            onFiles([...(event.currentTarget.files ?? [])]);
            event.currentTarget.value = "";
          }}
        />
        <label
          htmlFor={id}
          className={`${buttonLook(primary ? "primary" : "plain", large ? "large" : "small")} peer-focus-visible:outline-2 peer-focus-visible:outline-offset-2 peer-focus-visible:outline-blue`}
        >
          {label}
        </label>
      </div>
      <p id={`${id}-words`} className={large ? "max-w-prose text-body text-soft" : "text-small text-soft"}>
        {words}
      </p>
    </div>
  );
}
