import { cache } from 'react';
import { findCompanyBySlug } from '@/lib/services/company/find-by-slug';

/** The contractor of an address, read once per request. */
export const readCompany = cache(findCompanyBySlug);
