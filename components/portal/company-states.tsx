'use client';

import { ButtonLink } from '@/components/ui/button';
import { NotFound } from '@/components/ui/states';
import { paths } from '@/lib/paths';
import { useContractor } from './contractor';

/** Not found, with the contractor's telephone and the way home. */
export function CompanyNotFound() {
  const contractor = useContractor();
  return (
    <NotFound
      contact={contractor}
      actions={contractor && <ButtonLink href={paths.home(contractor.slug)}>Go to my kitchen</ButtonLink>}
    />
  );
}
