/** What the queue's jobs do. Each is safe to run twice: a worker may die after the work and before saying so. */
import { sendMail } from "@/lib/server/mail";
import type { QueueHandlers } from "@/lib/server/queue";
import { runNestJob } from "./nest-job";
import { runPackageJob } from "./package-job";

export const queueHandlers: QueueHandlers = {
  mail: sendMail,
  nest: runNestJob,
  package: runPackageJob,
};
