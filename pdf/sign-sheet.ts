/**
 * Puts the shop's signature into a painted sheet that has room for it: PKCS#7, detached, over every byte but the
 * signature's own (ISO 32000-1, 12.8.3.3). The time signed is handed in and the padding of RSA signatures is fixed
 * (PKCS #1 v1.5), so equal sheets and equal certificates give equal bytes.
 */
import forge from "node-forge";
import { SignPdf } from "@signpdf/signpdf";
import { Signer } from "@signpdf/utils";

/** A private key with its certificate first and those that vouch for it after. */
export interface SigningKey {
  readonly key: forge.pki.rsa.PrivateKey;
  readonly certificates: readonly forge.pki.Certificate[];
}

/** Room a signature takes beside its certificates and the signature's own number: names, hashes, times. */
const ROOM_BESIDE = 900;

/** Bytes that a signature by this key is sure to fit in. */
export function signatureRoom({ key, certificates }: SigningKey): number {
  const bytes = certificates.map((one) => forge.asn1.toDer(forge.pki.certificateToAsn1(one)).length());
  return bytes.reduce((sum, one) => sum + one, ROOM_BESIDE + Math.ceil(key.n.bitLength() / 8));
}

/** @throws when the document has no room for a signature: only sheets painted with one are handed here. */
export async function signSheet(bytes: Uint8Array, key: SigningKey, signedAt: Date): Promise<Uint8Array> {
  return new Uint8Array(await new SignPdf().sign(Buffer.from(bytes), new KeySigner(key), signedAt));
}

class KeySigner extends Signer {
  readonly #key: SigningKey;

  constructor(key: SigningKey) {
    super();
    this.#key = key;
  }

  override async sign(bytes: Buffer, signedAt: Date = new Date(0)): Promise<Buffer> {
    return Buffer.from(detachedSignature(bytes, this.#key, signedAt));
  }
}

/** The signature itself, DER. */
export function detachedSignature(bytes: Uint8Array, { key, certificates }: SigningKey, signedAt: Date): Uint8Array {
  const [own] = certificates;
  if (own === undefined) throw new Error("A signature needs a certificate");
  const signed = forge.pkcs7.createSignedData();
  signed.content = forge.util.createBuffer(Buffer.from(bytes).toString("binary"));
  for (const one of certificates) signed.addCertificate(one);
  const { oids } = forge.pki;
  signed.addSigner({
    key, certificate: withReadableIssuer(own), digestAlgorithm: oids.sha256!,
    authenticatedAttributes: [
      { type: oids.contentType!, value: oids.data! },
      // Its types know strings only; a Date is what it encodes.
      { type: oids.signingTime!, value: signedAt as unknown as string },
      { type: oids.messageDigest! },
    ],
  });
  signed.sign({ detached: true });
  return Buffer.from(forge.asn1.toDer(signed.toAsn1()).getBytes(), "binary");
}

/** Whether the issuer's name comes out as it stands in the certificate: readers find the signer's certificate by it. */
export function isIssuerKept({ certificates }: SigningKey): boolean {
  return certificates.slice(0, 1).every((own) => {
    const written = forge.asn1.toDer(forge.pki.distinguishedNameToAsn1(withReadableIssuer(own).issuer)).getBytes();
    return forge.asn1.toDer(forge.pki.certificateToAsn1(own)).getBytes().includes(written);
  });
}

/**
 * The library reads a name as raw bytes and encodes it once more when it writes, which garbles every name beyond
 * ASCII: then no reader finds the certificate that signed. Names are decoded here before they are written again.
 */
function withReadableIssuer(certificate: forge.pki.Certificate): forge.pki.Certificate {
  const attributes = certificate.issuer.attributes.map((one) => (Number(one.valueTagClass) === Number(forge.asn1.Type.UTF8) ? { ...one, value: decoded(one.value) } : one));
  return { ...certificate, issuer: { ...certificate.issuer, attributes } };
}

/** A name just made is text already; one that was read is bytes. */
function decoded(value: forge.pki.CertificateField["value"]): forge.pki.CertificateField["value"] {
  if (typeof value !== "string") return value;
  try {
    return forge.util.decodeUtf8(value);
  } catch {
    return value;
  }
}
