import type { PageSummary } from '@/lib/contracts/page';

const TITLES: Readonly<Record<PageSummary['kind'], string>> = {
  agreement: 'agreement',
  changeOrder: 'change order',
  cancellation: 'cancellation',
  measureRevision: 'measure revision',
};

export const pageTitle = (kind: PageSummary['kind']): string => TITLES[kind];
