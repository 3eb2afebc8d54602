import { useState } from "react";
import type { RecognisedFile } from "../../../core/contract/engine";
import { formatCount } from "../../../core/figure/format";
import { Button } from "../../controls/Button";
import { FileCard } from "./FileCard";

const shownAtFirst = 40;

/** The files, refused ones first; a long list shows its start and opens on demand. */
export function FileList({ files }: { readonly files: readonly RecognisedFile[] }) {
  const [all, setAll] = useState(false);
  const ordered = [...files.filter((file) => "refused" in file), ...files.filter((file) => "report" in file)];
  const shown = all ? ordered : ordered.slice(0, shownAtFirst);
  return (
    <>
      {shown.map((file) => (
        <FileCard key={file.path} file={file} />
      ))}
      {shown.length < ordered.length ? (
        <div>
          <Button onPress={() => setAll(true)}>Show all {formatCount(ordered.length)} files</Button>
        </div>
      ) : null}
    </>
  );
}
