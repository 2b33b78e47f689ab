import { notFound } from 'next/navigation';
import type { ReactNode } from 'react';
import { requireMember } from '@/app/[company]/member';
import { readCompany } from '@/app/[company]/read-company';
import { DeskFrame } from '@/components/desk/desk-frame';

export default async function DeskLayout({
  params,
  children,
}: {
  params: Promise<{ company: string }>;
  children: ReactNode;
}) {
  const { company: slug } = await params;
  const company = await readCompany(slug);
  if (!company) notFound();
  const member = await requireMember(slug);
  return (
    <DeskFrame company={company} member={member}>
      {children}
    </DeskFrame>
  );
}
