import { NotHere } from "@/components/people/not-here";

export default function NotFound() {
  return <NotHere />;
}
