import { afterEach, beforeEach, expect, vi } from "vitest";

// An unexpected warning or error on the console is a fault nobody looked at: it fails the test that caused it.
beforeEach(() => {
  vi.spyOn(console, "error");
  vi.spyOn(console, "warn");
});

afterEach(() => {
  expect(vi.mocked(console.error).mock.calls, "console.error").toEqual([]);
  expect(vi.mocked(console.warn).mock.calls, "console.warn").toEqual([]);
  vi.restoreAllMocks();
});
