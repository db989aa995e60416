import { Linking } from 'react-native';

/** Leaves for somebody else's page, such as the payment provider's. */
export const goTo = (url: string): void => void Linking.openURL(url);
