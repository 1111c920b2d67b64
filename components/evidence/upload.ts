export type UploadTarget = {
  readonly claimId: string;
  readonly rowId: string;
  readonly kind: "photo" | "runLog" | "document";
};

/** Why an upload did not arrive: the sentence to show; `canRetry` where the same file may well go through later. */
export type UploadFault = { readonly sentence: string | null; readonly canRetry: boolean };

export type Upload = { readonly done: Promise<void>; readonly cancel: () => void };

const sentenceIn = (text: string): string | null => {
  try {
    const body: unknown = JSON.parse(text);
    return typeof body === "object" && body !== null && "title" in body && typeof body.title === "string"
      ? body.title
      : null;
  } catch {
    return null;
  }
};

/** When the camera says the picture was taken: the phone's word, marked as such until the original has arrived. */
const capturedFrom = (file: File): string =>
  JSON.stringify({ takenAt: new Date(file.lastModified).toISOString(), by: "phone" });

/** Sends one file and tells how far it is, 0 to 100. Rejects with an `UploadFault`. */
export function sendFile(file: File, target: UploadTarget, onPercent: (percent: number) => void): Upload {
  const request = new XMLHttpRequest();
  const done = new Promise<void>((resolve, reject) => {
    const fail = (fault: UploadFault) => reject(Object.assign(new Error("upload failed"), fault));
    request.upload.addEventListener("progress", ({ loaded, total }) =>
      onPercent(total > 0 ? Math.round((100 * loaded) / total) : 0),
    );
    request.addEventListener("load", () => {
      if (request.status >= 200 && request.status < 300) resolve();
      else fail({ sentence: sentenceIn(request.responseText), canRetry: request.status >= 500 });
    });
    request.addEventListener("error", () => fail({ sentence: null, canRetry: true }));
    request.addEventListener("abort", () => fail({ sentence: null, canRetry: true }));
  });
  const form = new FormData();
  // The fields go first: the server decides on them while the file is still on its way.
  form.set("claimId", target.claimId);
  form.set("rowId", target.rowId);
  form.set("kind", target.kind);
  form.set("captured", capturedFrom(file));
  form.set("file", file);
  request.open("POST", "/api/v1/evidence");
  request.send(form);
  return { done, cancel: () => request.abort() };
}

/** The fault of a rejected upload. */
export const faultOf = (reason: unknown): UploadFault =>
  typeof reason === "object" && reason !== null && "canRetry" in reason && "sentence" in reason
    ? {
        sentence: typeof reason.sentence === "string" ? reason.sentence : null,
        canRetry: reason.canRetry === true,
      }
    : { sentence: null, canRetry: true };
