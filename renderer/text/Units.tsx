import { superscriptRuns } from "../../core/figure/text-width";

/** Text with superscripts as raised figures: the font has no superscript minus. */
export function Units({ text }: { readonly text: string }) {
  return (
    <>
      {superscriptRuns(text).map((run, index) => {
        // biome-ignore lint/suspicious/noArrayIndexKey: the runs of one text have no other identity
        return run.raised ? <sup key={index}>{run.text}</sup> : <span key={index}>{run.text}</span>;
      })}
    </>
  );
}
