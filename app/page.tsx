import { Home } from "@/components/shell/home";

export default function HomePage() {
  return <Home />;
}
