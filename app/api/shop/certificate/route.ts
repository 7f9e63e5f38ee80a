import { makeCertificate, uploadCertificate } from "@/lib/commands/keep-certificate";
import { shopCertificates } from "@/lib/queries/shop-certificates";
import { certificateUploadSchema, P12_BODY_MAX_BYTES } from "@/lib/rules/certificates";
import { read } from "@/lib/server/read";
import { write } from "@/lib/server/write";

export const GET = read("shop.read", { run: (viewer) => shopCertificates(viewer) });

/** Takes a .p12 with its password; both are sealed before they are kept. */
export const PUT = write("shop.change", {
  body: certificateUploadSchema,
  maxBytes: P12_BODY_MAX_BYTES,
  run: async (context, { body }) => {
    await uploadCertificate(context, { p12: Buffer.from(body.p12, "base64"), password: body.password });
  },
});

/** A new one, self-signed under the shop's name. */
export const POST = write("shop.change", {
  status: 201,
  run: async (context) => {
    await makeCertificate(context);
  },
});
