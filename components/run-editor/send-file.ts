/** Sends one file and tells how far it is; fetch cannot tell, so this is the one place with XMLHttpRequest. */
import { ApiFailure } from "@/components/ui/fetcher";
import type { ApiError } from "@/lib/rules/api-types";

/**
 * POSTs a file as the multipart field `file`.
 * @param onPart called with the part sent, 0 to 1.
 * @throws ApiFailure with the server's plain sentence.
 */
export function sendFile(path: string, file: File, onPart: (part: number) => void): Promise<void> {
  return new Promise((resolve, reject) => {
    const request = new XMLHttpRequest();
    const form = new FormData();
    form.append("file", file);
    request.open("POST", path);
    request.setRequestHeader("accept", "application/json");
    request.upload.onprogress = (event) => onPart(event.lengthComputable && event.total > 0 ? event.loaded / event.total : 0);
    request.onload = () => (request.status < 300 ? resolve() : reject(failureOf(request)));
    request.onerror = () => reject(new ApiFailure(0, "offline", "The server did not answer. Check the connection and send the file again.", {}));
    request.send(form);
  });
}

function failureOf(request: XMLHttpRequest): ApiFailure {
  try {
    const body = JSON.parse(request.responseText) as Partial<ApiError>;
    if (body.message && body.code) return new ApiFailure(request.status, body.code, body.message, body.fields ?? {}, body);
  } catch {
    // No JSON: the sentence below says what the status means.
  }
  return new ApiFailure(request.status, "failed", request.status === 413 ? "That file is too large." : request.status === 415 ? "That kind of file is not accepted." : "The server did not take this file.", {});
}
