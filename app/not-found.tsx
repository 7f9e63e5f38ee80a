import { ButtonLink } from "@/components/ui/button";

export default function NotFound() {
  return (
    <div className="mx-auto max-w-2xl py-10">
      <h1>There is no such page</h1>
      <p className="mt-2 mb-6 text-soft">
        The address may be cut short, or what it named belongs to another shop.
      </p>
      <ButtonLink href="/" tone="primary">
        Go to your start
      </ButtonLink>
    </div>
  );
}
