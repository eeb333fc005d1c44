import type { Metadata } from 'next';
import { notFound } from 'next/navigation';
import { requirePage } from '@/app/console/_components/require-page';
import { findCalculation } from '@/lib/solvers/registry';
import { Bench } from '../../_bench/bench';

interface CalculationPageProps {
  readonly params: Promise<{ readonly group: string; readonly calculation: string }>;
}

export async function generateMetadata({ params }: CalculationPageProps): Promise<Metadata> {
  const { group, calculation } = await params;
  return { title: findCalculation(group, calculation)?.title ?? 'Bench' };
}

export default async function CalculationPage({ params }: CalculationPageProps) {
  const { group, calculation: id } = await params;
  await requirePage('/console/bench', `/console/bench/${group}/${id}`);
  if (!findCalculation(group, id)) notFound();
  return <Bench group={group} id={id} />;
}
