import type { Metadata } from 'next';
import { headers } from 'next/headers';
import { notFound } from 'next/navigation';
import type { ReactNode } from 'react';
import { brandColours, brandStyle } from '@/components/portal/brand-colours';
import { ContractorProvider } from '@/components/portal/contractor';
import { SessionWatch } from '@/components/sign-in/session-watch';
import { readCompany } from './read-company';

interface Props {
  readonly params: Promise<{ company: string }>;
  readonly children: ReactNode;
}

export async function generateMetadata({ params }: Props): Promise<Metadata> {
  const company = await readCompany((await params).company);
  return company ? { title: { default: company.name, template: `%s · ${company.name}` } } : {};
}

/** Everything under a contractor's address stands in their colour. */
export default async function CompanyLayout({ params, children }: Props) {
  const company = await readCompany((await params).company);
  if (!company) notFound();
  const nonce = (await headers()).get('x-nonce') ?? undefined;
  return (
    <>
      <style nonce={nonce} dangerouslySetInnerHTML={{ __html: brandStyle(brandColours(company.brand)) }} />
      <ContractorProvider value={{ slug: company.slug, name: company.name, phone: company.phone }}>
        {children}
        <SessionWatch />
      </ContractorProvider>
    </>
  );
}
