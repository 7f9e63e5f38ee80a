import type { Metadata } from "next";
import { AuthFrame } from "@/components/auth/auth-frame";
import { SignUpForm } from "@/components/auth/sign-up-form";

export const metadata: Metadata = { title: "Open a shop" };

export default function SignUpPage() {
  return (
    <AuthFrame title="Open a shop" lead="You become its owner and invite the others.">
      <SignUpForm />
    </AuthFrame>
  );
}
