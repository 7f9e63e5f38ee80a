/** What a shop may upload to sign with, and what is said of what it may not. */
import { execFileSync } from "node:child_process";
import { mkdtempSync, readFileSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import path from "node:path";
import { describe, expect, it } from "vitest";
import { endWarning, fingerprintText } from "@/lib/rules/certificates";
import { certificateFacts, certificateRefusal } from "@/lib/server/certificate-facts";
import { makeP12, openP12 } from "@/lib/server/p12";
import { uploadedP12 } from "../p12-files";

const NOW = new Date("2026-06-01T08:00:00Z");
const words = (bytes: Uint8Array, password: string): string => {
  try {
    openP12(bytes, password);
    return "opened";
  } catch (error) {
    return (error as Error).message;
  }
};

describe("a certificate of the shop's own", () => {
  it("carries the shop's name, holds for ten years from a day before, and signs", async () => {
    const { p12, password } = await makeP12("Łódź Rohrbau & Söhne", NOW);
    const opened = openP12(p12, password);
    const facts = certificateFacts(opened.certificates);
    expect(facts.subject).toBe("Łódź Rohrbau & Söhne");
    expect(facts.issuer).toBe(facts.subject);
    expect(facts.validFrom.toISOString()).toBe("2026-05-31T08:00:00.000Z");
    expect(facts.validTo.toISOString()).toBe("2036-06-01T00:00:00.000Z");
    expect(opened.key.n.bitLength()).toBe(2048);
    expect(certificateRefusal(opened.certificates[0]!, NOW)).toBeNull();
    expect(facts.fingerprint).toMatch(/^[0-9a-f]{64}$/);
  });

  it("is made under another key and password each time, and cuts a name no certificate can carry", async () => {
    const [one, two] = [await makeP12("A".repeat(300), NOW), await makeP12("", NOW)];
    expect(certificateFacts(openP12(one.p12, one.password).certificates).subject).toBe("A".repeat(64));
    expect(certificateFacts(openP12(two.p12, two.password).certificates).subject).toBe("Shop");
    expect(one.password).not.toBe(two.password);
    expect(words(one.p12, two.password)).toBe("That password does not open the .p12.");
  });
});

describe("an uploaded .p12", () => {
  it("opens with its password, in either common encryption", () => {
    for (const algorithm of ["aes256", "3des"] as const) {
      const p12 = uploadedP12({ password: "open it", algorithm });
      expect(words(p12, "open it"), algorithm).toBe("opened");
      for (const wrong of ["Open it", "", "open it "]) expect(words(p12, wrong), algorithm).toBe("That password does not open the .p12.");
    }
  });

  it("is refused in words when it is something else", () => {
    expect(words(Buffer.from("-----BEGIN CERTIFICATE-----"), "x")).toBe("That is not a .p12 file.");
    expect(words(new Uint8Array(), "x")).toBe("That is not a .p12 file.");
    expect(words(Buffer.from("3003020101", "hex"), "x")).toMatch(/not a \.p12 file this server can read/);
    expect(words(uploadedP12({ password: "x", bits: 1024 }), "x")).toMatch(/has 1024 bits. At least 2048/);
    expect(words(uploadedP12({ password: "x", holds: "no-key" }), "x")).toMatch(/no private key/);
    expect(words(uploadedP12({ password: "x", holds: "other-key" }), "x")).toMatch(/No certificate in that file belongs to its key/);
    const whole = uploadedP12({ password: "x" });
    expect(words(whole.subarray(0, whole.length - 40), "x")).not.toBe("opened");
  });

  it("is refused before it is opened when opening would keep the server busy", () => {
    expect(words(uploadedP12({ password: "x", rounds: 9_999 }), "x")).toBe("opened");
    expect(words(withRounds("x", 100_001), "x")).toMatch(/more than 100000 rounds/);
  });

  it("tells the certificate's end and purpose", () => {
    const refusal = (wish: Omit<Parameters<typeof uploadedP12>[0], "password">) => certificateRefusal(openP12(uploadedP12({ password: "x", ...wish }), "x").certificates[0]!, NOW);
    expect(refusal({ to: new Date("2026-05-01") })).toBe("That certificate ended on 2026-05-01. Upload one that is in force.");
    expect(refusal({ from: new Date("2027-01-02") })).toMatch(/begins on 2027-01-02/);
    expect(refusal({ keyUsage: { keyCertSign: true } })).toMatch(/not for signing/);
    expect(refusal({ keyUsage: { digitalSignature: true } })).toBeNull();
    expect(endWarning("2026-06-20T00:00:00Z", NOW)).toBe("This certificate ends in 18 days. Replace it before then.");
    expect(endWarning("2026-05-20T00:00:00Z", NOW)).toMatch(/has ended/);
    expect(endWarning("2036-05-20T00:00:00Z", NOW)).toBeNull();
    expect(fingerprintText("0aff")).toBe("0A:FF");
  });

  it("made by OpenSSL opens too, with the issuer's certificate behind its own", () => {
    const folder = mkdtempSync(path.join(tmpdir(), "p12-"));
    try {
      const run = (args: string) => execFileSync("openssl", args.split(" "), { cwd: folder, stdio: ["ignore", "ignore", "pipe"] });
      writeFileSync(path.join(folder, "usage"), "keyUsage=digitalSignature\n");
      run("req -x509 -newkey rsa:2048 -nodes -keyout ca.key -out ca.crt -days 400 -subj /CN=Office");
      run("req -newkey rsa:2048 -nodes -keyout own.key -out own.csr -subj /CN=Sheets");
      run("x509 -req -in own.csr -CA ca.crt -CAkey ca.key -CAcreateserial -out own.crt -days 300 -extfile usage");
      run("pkcs12 -export -inkey own.key -in own.crt -certfile ca.crt -out own.p12 -passout pass:open");
      const opened = openP12(readFileSync(path.join(folder, "own.p12")), "open");
      const facts = certificateFacts(opened.certificates);
      expect([facts.subject, facts.issuer, opened.certificates.length]).toEqual(["Sheets", "Office", 2]);
      expect(facts.certificatePem.match(/BEGIN CERTIFICATE/g)).toHaveLength(2);
    } finally {
      rmSync(folder, { recursive: true });
    }
  });
});

/** A keystore that asks for many rounds; made quickly, since node's own cryptography derives the key. */
function withRounds(password: string, rounds: number): Buffer {
  const asked = uploadedP12({ password, rounds: 2_048 });
  const small = Buffer.from("02020800", "hex");
  // The count stands last in the file, in the check of the whole; one byte longer, so every length around it grows by one.
  const at = asked.lastIndexOf(small);
  const large = Buffer.from(`0203${rounds.toString(16).padStart(6, "0")}`, "hex");
  const grown = Buffer.concat([asked.subarray(0, at), large, asked.subarray(at + small.length)]);
  growBy(grown, at, 1);
  return grown;
}

/** Adds to the lengths of every sequence of definite length that encloses a place. */
function growBy(bytes: Buffer, place: number, more: number): void {
  let at = 0;
  while (at < place) {
    const long = bytes[at + 1]! & 0x80 ? bytes[at + 1]! & 0x7f : 0;
    const head = 2 + long;
    const length = long === 0 ? bytes[at + 1]! : bytes.readUIntBE(at + 2, long);
    if (at + head + length <= place) {
      at += head + length;
      continue;
    }
    if (long === 0) bytes[at + 1] = length + more;
    else bytes.writeUIntBE(length + more, at + 2, long);
    at += head;
  }
}
