/** What is read of a request's headers, and of a file's name. */
import { describe, expect, test } from "vitest";
import { fileName } from "@/lib/server/body";
import { addressOf, deviceOf } from "@/lib/server/request-facts";
import { documentRefusal, documentSentence } from "@/lib/rules/document-refusal";
import { sheetNumberText } from "@/lib/rules/sheet-number";

const agent = (text: string) => new Headers({ "user-agent": text });

describe("request facts", () => {
  test("the address is the one the nearest proxy saw, whatever the sender wrote before it", () => {
    expect(addressOf(new Headers({ "x-forwarded-for": "10.0.0.1, 192.0.2.7" }))).toBe("192.0.2.7");
    expect(addressOf(new Headers())).toBe("unknown");
    expect(addressOf(new Headers({ "x-forwarded-for": "x".repeat(500) }))).toHaveLength(64);
  });

  test.each([
    ["Mozilla/5.0 (Windows NT 10.0; Win64; x64) AppleWebKit/537.36 Chrome/130.0 Safari/537.36 Edg/130.0", "Edge on Windows"],
    ["Mozilla/5.0 (iPhone; CPU iPhone OS 18_0 like Mac OS X) AppleWebKit/605.1 Version/18.0 Mobile Safari/604.1", "Safari on iPhone"],
    ["Mozilla/5.0 (Linux; Android 14) AppleWebKit/537.36 Chrome/130.0 Mobile Safari/537.36", "Chrome on Android"],
    ["<script>alert(1)</script>", "A browser"],
  ])("%s", (text, device) => expect(deviceOf(agent(text))).toBe(device));
});

describe("file names", () => {
  test.each([
    ["../../etc/passwd", "passwd"],
    ["C:\\field\\sketch 3.png", "sketch 3.png"],
    ["a\"b<c>.png", "abc.png"],
    ["\u0000\n", "file"],
    ["Maßblatt №3.pdf", "Maßblatt №3.pdf"],
  ])("%j", (sent, kept) => expect(fileName(sent)).toBe(kept));
});

describe("words of refusal", () => {
  test.each([
    ["runs.0.points.4.offset.e.mm: Invalid input", "Point 5 of the main run cannot be read: its offset is missing or out of range."],
    ["runs.2.points.0.item: Invalid", "Point 1 of branch 2 cannot be read: what stands there is missing or out of range."],
    ["runs.0.points: Too big", "A line may hold 2000 points at most."],
    ["settings.pipe.nps: Invalid option", "A setting of the line is missing or out of range."],
    ["Point id p1 is used twice.", "Point id p1 is used twice."],
    ["version: Invalid input: expected 1", "It is not a run document of this version."],
  ])("%s", (message, sentence) => expect(documentSentence(message)).toBe(sentence));

  test("many reasons become a few, each once", () => {
    expect(documentRefusal(["runs.0.points.0.note: x", "runs.0.points.0.note: y", "number: z"])).toBe(
      "This run cannot be saved. Point 1 of the main run cannot be read: its note is missing or out of range. The line needs a number.",
    );
  });
});

test("a sheet's number is padded and never cut", () => {
  expect([null, 1, 42, 12_345].map(sheetNumberText)).toEqual(["", "0001", "0042", "12345"]);
});
