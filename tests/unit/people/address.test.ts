import { afterEach, describe, expect, it, vi } from "vitest";
import { addressIn, addressOf } from "@/lib/web/address";

afterEach(() => {
  vi.unstubAllEnvs();
});

describe("where a try to sign in is counted", () => {
  it.each([
    [null, 1, "local"],
    ["", 1, "local"],
    ["203.0.113.9", 1, "203.0.113.9"],
    ["198.51.100.1, 203.0.113.9", 1, "203.0.113.9"],
    ["198.51.100.1, 203.0.113.9, 10.0.0.1", 2, "203.0.113.9"],
    ["203.0.113.9", 2, "local"],
    ["::ffff:127.0.0.1", 1, "127.0.0.1"],
    ["::1", 1, "0:0:0:0::/64"],
    ["2001:db8:0:7:a:b:c:d", 1, "2001:db8:0:7::/64"],
    ["2001:0DB8::9", 1, "2001:db8:0:0::/64"],
    ["somewhere else", 1, "local"],
    ["203.0.113.9,", 1, "local"],
    ["x,".repeat(10_000), 1, "local"],
  ])("header %j with %i proxies in front", (header, proxies, counted) => {
    expect(addressIn(header, proxies)).toBe(counted);
  });

  it("is the same for every device of one IPv6 network", () => {
    expect(addressIn("2001:db8:1:2::1")).toBe(addressIn("2001:db8:1:2:ffff::9"));
    expect(addressIn("2001:db8:1:2::1")).not.toBe(addressIn("2001:db8:1:3::1"));
  });

  it("is read past as many proxies as the setting says, and past one without it", () => {
    const incoming = new Headers({ "x-forwarded-for": "192.0.2.1, 198.51.100.1, 203.0.113.9" });
    vi.stubEnv("TRUSTED_PROXY", undefined);
    expect(addressOf(incoming)).toBe("203.0.113.9");
    vi.stubEnv("TRUSTED_PROXY", "2");
    expect(addressOf(incoming)).toBe("198.51.100.1");
    vi.stubEnv("TRUSTED_PROXY", "all of them");
    expect(() => addressOf(incoming)).toThrow("TRUSTED_PROXY");
  });
});
