import type { Metadata } from "next";
import { AuthFrame } from "@/components/auth/auth-frame";
import { ResetRequestForm } from "@/components/auth/password-forms";

export const metadata: Metadata = { title: "Set a new password" };

export default function ResetPage() {
  return (
    <AuthFrame title="Set a new password" lead="We mail you a link that lets you choose one.">
      <ResetRequestForm />
    </AuthFrame>
  );
}
