export { useAct } from '@/app/_components/use-act';
