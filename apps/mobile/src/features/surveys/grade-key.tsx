import { Text } from '@/components/text';

/** What the shapes of a sketch stand for. */
export const GradeKey = ({ now = false }: { now?: boolean }) => (
  <Text size="small" tone="inkSoft">
    {`Full dots grade A, rings B, triangles C, crosses D. The bar at the foot is the peg.${now ? ' The dashed line is the cast being typed.' : ''}`}
  </Text>
);
