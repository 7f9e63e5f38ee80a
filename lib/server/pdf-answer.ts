/** A PDF as an answer: shown inline under a name, never guessed at, never kept by caches in between. */
export function pdfAnswer(bytes: Uint8Array, fileName: string): Response {
  const plain = fileName.replace(/[^A-Za-z0-9._ -]/g, "-");
  return new Response(new Uint8Array(bytes), {
    headers: {
      "content-type": "application/pdf",
      "content-length": String(bytes.length),
      "content-disposition": `inline; filename="${plain}"; filename*=UTF-8''${encodeURIComponent(fileName)}`,
      "cache-control": "private, no-store",
      "x-content-type-options": "nosniff",
    },
  });
}
