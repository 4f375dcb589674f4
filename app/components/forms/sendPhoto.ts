/** Sends one picture by itself, with its progress; the same command again stores nothing twice, so that a retry is safe. */
export type Sent = { ok: true; file: string } | { ok: false; why: string; again: boolean };

/** An id for a command. Works on a plain HTTP page in the hangar's own network too, where randomUUID is not there. */
export function newCommandId(): string {
  const bytes = crypto.getRandomValues(new Uint8Array(16));
  return [...bytes].map((b) => b.toString(16).padStart(2, "0")).join("");
}

/** @param onShare called with 0 to 1 as bytes leave. @returns the file's id, or a sentence and whether sending again can help. */
export function sendPhoto(address: string, commandId: string, picture: File, onShare: (share: number) => void): Promise<Sent> {
  return new Promise((done) => {
    const request = new XMLHttpRequest();
    const form = new FormData();
    form.set("commandId", commandId);
    form.set("photo", picture, picture.name);
    request.upload.onprogress = (event) => event.lengthComputable && onShare(event.loaded / event.total);
    request.onload = () => {
      const answer = answerOf(request.responseText);
      if (request.status < 300 && answer.file) done({ ok: true, file: answer.file });
      else
        done({
          ok: false,
          why: answer.message ?? "The board could not take it. Send it again.",
          again: request.status >= 500 || request.status === 429,
        });
    };
    request.onerror = () => done({ ok: false, why: "No network. It is kept here: send it again when you are connected.", again: true });
    request.open("POST", address);
    request.send(form);
  });
}

function answerOf(text: string): { file?: string; message?: string } {
  try {
    return JSON.parse(text) as { file?: string; message?: string };
  } catch {
    return {};
  }
}
