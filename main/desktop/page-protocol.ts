import { pageHeaders } from "../engine/process/content-policy";
import type { PageFiles } from "../engine/process/page-files";
import { pageOrigin } from "./window-options";

/** Answers the page's own scheme from the files listed at the start, by their exact addresses; 404 for all others. */
export function answerPage(files: PageFiles, method: string, address: string): Response {
  const file = address.startsWith(`${pageOrigin}/`) ? files.get(address.slice(pageOrigin.length)) : undefined;
  if (method !== "GET" || !file) return new Response("No such file.\n", { status: 404, headers: pageHeaders() });
  return new Response(file.body, { headers: { ...pageHeaders(), "Content-Type": file.type } });
}
