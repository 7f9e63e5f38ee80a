/** Every table as a class. bindModels ties them to a database handle; each module world does so once. */
import type { Sequelize } from "sequelize";
import { AuditEvent } from "./audit-event";
import { CopyWithdrawal } from "./copy-withdrawal";
import { Counter } from "./counter";
import { Invitation } from "./invitation";
import { Job } from "./job";
import { Line } from "./line";
import { LineTouch } from "./line-touch";
import { Membership } from "./membership";
import { Nest } from "./nest";
import { Offcut } from "./offcut";
import { Package } from "./package";
import { PackagePart } from "./package-part";
import { PackageReceipt } from "./package-receipt";
import { PackageSheet } from "./package-sheet";
import { PasswordReset } from "./password-reset";
import { Person } from "./person";
import { Revision } from "./revision";
import { RevisionInput } from "./revision-input";
import { RevisionSheet } from "./revision-sheet";
import { Session } from "./session";
import { SheetCopy } from "./sheet-copy";
import { Shop } from "./shop";
import { ShopCertificate } from "./shop-certificate";
import { SignOff } from "./sign-off";
import { Spool } from "./spool";
import { SpoolMeasurement } from "./spool-measurement";
import { Survey } from "./survey";
import { TakeOutWord } from "./take-out-word";
import { Throttle } from "./throttle";
import { Upload } from "./upload";
import { WorkEntry } from "./work-entry";

export {
  AuditEvent,
  CopyWithdrawal,
  Counter,
  Invitation,
  Job,
  Line,
  LineTouch,
  Membership,
  Nest,
  Offcut,
  Package,
  PackagePart,
  PackageReceipt,
  PackageSheet,
  PasswordReset,
  Person,
  Revision,
  RevisionInput,
  RevisionSheet,
  Session,
  SheetCopy,
  Shop,
  ShopCertificate,
  SignOff,
  Spool,
  SpoolMeasurement,
  Survey,
  TakeOutWord,
  Throttle,
  Upload,
  WorkEntry,
};

const MODELS = [
  AuditEvent,
  CopyWithdrawal,
  Counter,
  Invitation,
  Job,
  Line,
  LineTouch,
  Membership,
  Nest,
  Offcut,
  Package,
  PackagePart,
  PackageReceipt,
  PackageSheet,
  PasswordReset,
  Person,
  Revision,
  RevisionInput,
  RevisionSheet,
  Session,
  SheetCopy,
  Shop,
  ShopCertificate,
  SignOff,
  Spool,
  SpoolMeasurement,
  Survey,
  TakeOutWord,
  Throttle,
  Upload,
  WorkEntry,
];

/** Binds every model to a handle. Associations are not declared: composite keys are, in the migrations. */
export function bindModels(sequelize: Sequelize): void {
  for (const model of MODELS) model.bindTo(sequelize);
}
