"use client";
import { zodResolver } from "@hookform/resolvers/zod";
import { signIn } from "next-auth/react";
import Link from "next/link";
import { useForm } from "react-hook-form";
import { Button } from "@/components/ui/button";
import { apiSend } from "@/components/ui/fetcher";
import { TextField } from "@/components/ui/field";
import { Notice } from "@/components/ui/notice";
import { useFormSend } from "@/components/ui/use-form-send";
import { signUpSchema, type SignUpForm } from "@/lib/rules/forms";

const FIELDS = ["shopName", "name", "email", "password"] as const;

/** Opens a shop with its first owner and signs that person in. */
export function SignUpForm() {
  const { register, handleSubmit, setError, formState } = useForm<SignUpForm>({
    resolver: zodResolver(signUpSchema),
    defaultValues: { shopName: "", name: "", email: "", password: "" },
  });
  const { trouble, send } = useFormSend(setError, FIELDS);
  const { errors } = formState;
  const open = (values: SignUpForm) =>
    send(async () => {
      await apiSend("POST", "/api/sign-up", values);
      const answer = await signIn("credentials", {
        email: values.email,
        password: values.password,
        redirect: false,
      });
      window.location.assign(answer?.ok ? "/jobs" : "/sign-in");
    });
  return (
    <form noValidate onSubmit={(event) => void handleSubmit(open)(event)} className="space-y-4">
      {trouble ? <Notice tone="trouble">{trouble}</Notice> : null}
      <TextField
        label="Name of the shop"
        hint="Printed in the title block of every sheet."
        autoComplete="organization"
        error={errors.shopName?.message}
        {...register("shopName")}
      />
      <TextField
        label="Your name"
        hint="Printed where you draw or sign."
        autoComplete="name"
        error={errors.name?.message}
        {...register("name")}
      />
      <TextField
        label="E-mail address"
        type="email"
        autoComplete="username"
        error={errors.email?.message}
        {...register("email")}
      />
      <TextField
        label="Password"
        hint="At least 12 characters."
        type="password"
        autoComplete="new-password"
        error={errors.password?.message}
        {...register("password")}
      />
      <Button
        type="submit"
        tone="primary"
        className="w-full"
        busy={formState.isSubmitting}
        busyLabel="Opening the shop"
      >
        Open the shop
      </Button>
      <p>
        Signed up already?{" "}
        <Link href="/sign-in" className="inked">
          Sign in
        </Link>
      </p>
    </form>
  );
}
