import { useMediaQuery } from '@mantine/hooks';

/** Whether the page is as narrow as a phone; the same width at which the style sheets change. */
export const useIsPhone = (): boolean =>
  useMediaQuery('(max-width: 47.99em)', false, { getInitialValueInEffect: false });
