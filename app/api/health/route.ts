import { healthRoute } from '@/lib/http/health';

export const dynamic = 'force-dynamic';

export const GET = healthRoute;
