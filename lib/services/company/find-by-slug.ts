import { eq } from 'drizzle-orm';
import { withScope } from '@/db/client';
import { companies } from '@/db/schema';
import type { CompanyBrand } from '@/lib/contracts/brand';

/** What a visitor who is not signed in may know of a contractor; null when there is none by that slug. */
export async function findCompanyBySlug(slug: string): Promise<CompanyBrand | null> {
  return withScope({ kind: 'slug', key: slug }, async (tx) => {
    const [row] = await tx
      .select({
        id: companies.id,
        slug: companies.slug,
        name: companies.name,
        phone: companies.phone,
        licence: companies.licence,
        timeZone: companies.timeZone,
        state: companies.state,
        brand: companies.brand,
      })
      .from(companies)
      .where(eq(companies.slug, slug));
    return row ?? null;
  });
}
