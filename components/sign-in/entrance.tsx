import type { ReactNode } from 'react';
import { PortalFrame } from '@/components/portal/portal-frame';
import { Panel } from '@/components/ui/panel';
import { CallLine } from '@/components/ui/states';
import type { CompanyBrand } from '@/lib/contracts/brand';
import { EntranceDrawing } from './entrance-drawing';

/** The contractor's entrance: what is to be done on the left, a drawing beside it where there is room. */
export function Entrance({ company, children }: { company: CompanyBrand; children: ReactNode }) {
  return (
    <PortalFrame company={company}>
      <div className="grid gap-frame md:grid-cols-[minmax(0,1fr)_minmax(0,24rem)]">
        <Panel as="div" className="grid content-start gap-5 py-5! md:px-8! md:py-8!">
          {children}
          <div className="border-t border-hairline pt-4">
            <CallLine contact={company} />
          </div>
        </Panel>
        <Panel as="div" className="hidden place-items-center md:grid">
          <EntranceDrawing className="w-full max-w-80" />
        </Panel>
      </div>
    </PortalFrame>
  );
}
