import { Mark } from './_components/mark';

export default function FrontPage() {
  return (
    <main className="mx-auto max-w-page px-7 pt-5">
      <Mark />
    </main>
  );
}
