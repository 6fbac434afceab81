import { PageHeader } from "~/components/page-header";

export default function Home() {
  return <PageHeader title="Send a drawing, get back parts that fit" />;
}
