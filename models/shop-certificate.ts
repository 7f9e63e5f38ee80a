import { Model, type InferAttributes, type InferCreationAttributes, type Sequelize } from "sequelize";
import { idColumn, integerColumn, modelOptions, textColumn, timeColumn, uuidColumn } from "./columns";

/** A certificate the shop signs sheets with; the one with the highest ordinal is in use. Insert-only. */
export class ShopCertificate extends Model<InferAttributes<ShopCertificate>, InferCreationAttributes<ShopCertificate>> {
  declare shopId: string;
  declare id: string;
  declare ordinal: number;
  declare origin: "made" | "uploaded";
  declare subject: string;
  declare issuer: string;
  /** SHA-256 of the certificate, lower-case hex. */
  declare fingerprint: string;
  declare validFrom: Date;
  declare validTo: Date;
  /** Public: the shop's certificate first, then those that vouch for it. */
  declare certificatePem: string;
  declare sealedP12: string;
  declare sealedPassword: string;
  declare at: Date;
  declare by: string;

  static bindTo(sequelize: Sequelize): void {
    ShopCertificate.init(
      {
        shopId: uuidColumn(),
        id: idColumn(),
        ordinal: integerColumn(),
        origin: textColumn(),
        subject: textColumn(),
        issuer: textColumn(),
        fingerprint: textColumn(),
        validFrom: timeColumn(),
        validTo: timeColumn(),
        certificatePem: textColumn(),
        sealedP12: textColumn(),
        sealedPassword: textColumn(),
        at: timeColumn(),
        by: uuidColumn(),
      },
      modelOptions(sequelize, "ShopCertificate", "shop_certificates"),
    );
  }
}
