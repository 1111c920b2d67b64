import { useCallback, useState } from "react";
import { faultOf, sendFile, type Upload, type UploadTarget } from "./upload";

/** A file on its way: how far it is, and what stopped it. */
export type Sending = {
  id: string;
  file: File;
  percent: number;
  fault: { sentence: string | null; canRetry: boolean } | null;
  upload: Upload | null;
};

/** The files somebody chose that have not arrived yet; one that arrived leaves the list once `onSent` has read anew. */
export function useSending(target: UploadTarget, onSent: () => Promise<unknown>) {
  const [sending, setSending] = useState<readonly Sending[]>([]);
  const change = useCallback(
    (id: string, next: Partial<Sending>) =>
      setSending((all) => all.map((one) => (one.id === id ? { ...one, ...next } : one))),
    [],
  );
  const forget = (id: string) => setSending((all) => all.filter((one) => one.id !== id));
  const send = (id: string, file: File) => {
    const upload = sendFile(file, target, (percent) => change(id, { percent }));
    change(id, { upload, fault: null, percent: 0 });
    upload.done
      .then(async () => {
        await onSent();
        forget(id);
      })
      .catch((reason: unknown) => change(id, { fault: faultOf(reason), upload: null }));
  };
  const take = (chosen: readonly File[]) => {
    const added = chosen.map((file) => ({
      id: crypto.randomUUID(),
      file,
      percent: 0,
      fault: null,
      upload: null,
    }));
    setSending((all) => [...all, ...added]);
    for (const { id, file } of added) send(id, file);
  };
  const drop = ({ id, upload }: Sending) => {
    upload?.cancel();
    forget(id);
  };
  return { sending, take, drop, retry: ({ id, file }: Sending) => send(id, file) };
}
