import "server-only";
import {
  AbortMultipartUploadCommand,
  CompleteMultipartUploadCommand,
  CreateMultipartUploadCommand,
  PutObjectCommand,
  UploadPartCommand,
} from "@aws-sdk/client-s3";
import { bucket, store } from "./client";

// The least a store takes as a part that is not the last one.
const PART_BYTES = 5 * 1024 * 1024;

/** Bytes of unknown length on their way to a key: one part in memory, sent when it is full and filled anew. */
export class PartUpload {
  private part: Buffer | undefined;
  private filledBytes = 0;
  private uploadId: string | undefined;
  private readonly tags: { ETag: string | undefined; PartNumber: number }[] = [];
  private running: Promise<unknown> = Promise.resolve();
  private isAborted = false;

  constructor(readonly key: string) {}

  private get place() {
    return { Bucket: bucket(), Key: this.key };
  }

  /** One request to the store after the other, and none once the upload was given up. */
  private ask<T>(send: () => Promise<T>): Promise<T> {
    if (this.isAborted) return Promise.reject(new Error("the upload was given up"));
    const asked = send();
    this.running = asked.catch(() => undefined);
    return asked;
  }

  private get filled(): Buffer {
    return (this.part ?? Buffer.alloc(0)).subarray(0, this.filledBytes);
  }

  private async sendPart(): Promise<void> {
    const started = this.uploadId ?? (await this.ask(() => this.start()));
    const PartNumber = this.tags.length + 1;
    const part = { ...this.place, UploadId: started, PartNumber, Body: this.filled };
    const { ETag } = await this.ask(() => store().send(new UploadPartCommand(part)));
    this.tags.push({ ETag, PartNumber });
    this.filledBytes = 0;
  }

  private async start(): Promise<string | undefined> {
    const { UploadId } = await store().send(new CreateMultipartUploadCommand(this.place));
    this.uploadId = UploadId;
    return UploadId;
  }

  /** Takes more bytes; settles when there is room for the next. */
  async write(data: Buffer): Promise<void> {
    this.part ??= Buffer.allocUnsafeSlow(PART_BYTES);
    for (let at = 0; at < data.length;) {
      if (this.filledBytes === PART_BYTES) await this.sendPart();
      const taken = data.copy(this.part, this.filledBytes, at);
      this.filledBytes += taken;
      at += taken;
    }
  }

  /** Settles when every byte is kept under the key. */
  async end(): Promise<void> {
    if (!this.uploadId) {
      await this.ask(() => store().send(new PutObjectCommand({ ...this.place, Body: this.filled })));
      return;
    }
    await this.sendPart();
    const whole = { ...this.place, UploadId: this.uploadId, MultipartUpload: { Parts: this.tags } };
    await this.ask(() => store().send(new CompleteMultipartUploadCommand(whole)));
  }

  /** Leaves no part in the store, whatever was under way. */
  async abort(): Promise<void> {
    this.isAborted = true;
    await this.running;
    if (this.uploadId)
      await store().send(new AbortMultipartUploadCommand({ ...this.place, UploadId: this.uploadId }));
  }
}
