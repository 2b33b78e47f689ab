import { redirect } from 'next/navigation';
import { paths } from '@/lib/paths';

export default async function DeskPage({ params }: { params: Promise<{ company: string }> }) {
  redirect(paths.deskJobs((await params).company));
}
