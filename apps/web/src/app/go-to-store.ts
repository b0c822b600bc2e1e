import { createSpotlight } from '@mantine/spotlight';

/** Opens and closes `GoTo` from anywhere in the frame. */
export const [goToStore, goTo] = createSpotlight();
