'use client';

import { createContext, useContext, type ReactNode } from 'react';

/** What every screen under a contractor's address may say of them. */
export interface Contractor {
  readonly slug: string;
  readonly name: string;
  readonly phone: string;
}

const Context = createContext<Contractor | null>(null);

/** Makes the contractor known to the client components below. */
export function ContractorProvider({ value, children }: { value: Contractor; children: ReactNode }) {
  return <Context value={value}>{children}</Context>;
}

/** The contractor of the page, or null outside a contractor's address. */
export const useContractor = (): Contractor | null => useContext(Context);
