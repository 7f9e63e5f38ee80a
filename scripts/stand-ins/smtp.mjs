/**
 * Stand-in for an SMTP server: keeps each mail as one JSON file in OUTBOX_DIR, sends nothing anywhere.
 * Environment: OUTBOX_DIR, STAND_IN_PORT. Ends when its parent goes away.
 */
import { randomUUID } from "node:crypto";
import { mkdirSync, renameSync, writeFileSync } from "node:fs";
import path from "node:path";
import { SMTPServer } from "smtp-server";
import { standIn } from "./stand-in.mjs";

const folder = process.env.OUTBOX_DIR;
mkdirSync(folder, { recursive: true, mode: 0o700 });

function keepMail(source, from, to) {
  const { text, subject, sentTo } = readMail(source);
  const receivedAt = new Date().toISOString();
  const id = `${receivedAt.replace(/[:.]/g, "-")}-${randomUUID()}`;
  const file = path.join(folder, `${id}.json`);
  writeFileSync(`${file}.new`, JSON.stringify({ id, receivedAt, from, to: to.length > 0 ? to : sentTo, subject, text }, null, 1), { mode: 0o600 });
  renameSync(`${file}.new`, file);
}

/** Reads a mail as nodemailer writes plain ones: headers, then one text part. */
function readMail(source) {
  const raw = source.toString("utf8").replace(/\r\n/g, "\n");
  const split = raw.indexOf("\n\n");
  const headers = new Map(
    raw.slice(0, split).replace(/\n[ \t]+/g, " ").split("\n").map((line) => [line.slice(0, line.indexOf(":")).toLowerCase(), line.slice(line.indexOf(":") + 1).trim()]),
  );
  return {
    subject: decodeWords(headers.get("subject") ?? ""),
    sentTo: [headers.get("to") ?? ""],
    text: decodeBody(raw.slice(split + 2), (headers.get("content-transfer-encoding") ?? "7bit").toLowerCase()),
  };
}

function decodeBody(body, encoding) {
  if (encoding === "base64") return Buffer.from(body, "base64").toString("utf8");
  if (encoding !== "quoted-printable") return body;
  return decodeQuoted(body.replace(/=\n/g, ""));
}

function decodeQuoted(text) {
  const bytes = [];
  for (let index = 0; index < text.length; index += 1) {
    const pair = text.slice(index + 1, index + 3);
    if (text[index] === "=" && /^[0-9A-Fa-f]{2}$/.test(pair)) {
      bytes.push(parseInt(pair, 16));
      index += 2;
    } else bytes.push(...Buffer.from(text[index], "utf8"));
  }
  return Buffer.from(bytes).toString("utf8");
}

/** RFC 2047 encoded words, as used in subjects with other than plain letters. */
function decodeWords(text) {
  return text.replace(/\?=\s+=\?/g, "?==?").replace(/=\?utf-8\?([bq])\?([^?]*)\?=/gi, (_, kind, coded) =>
    kind.toLowerCase() === "b" ? Buffer.from(coded, "base64").toString("utf8") : decodeQuoted(coded.replace(/_/g, " ")),
  );
}

const server = new SMTPServer({
  disabledCommands: ["AUTH", "STARTTLS"],
  logger: false,
  size: 5_000_000,
  onData(stream, session, done) {
    const parts = [];
    stream.on("data", (part) => parts.push(part));
    stream.on("end", () => {
      try {
        keepMail(Buffer.concat(parts), session.envelope.mailFrom.address, session.envelope.rcptTo.map(({ address }) => address));
        done();
      } catch (error) {
        done(error);
      }
    });
  },
});
server.on("error", (error) => console.error(error.message));
server.listen(Number(process.env.STAND_IN_PORT), "127.0.0.1", () => standIn.ready());
standIn.onStop((done) => server.close(done));
