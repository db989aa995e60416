import { Modal, Pressable, View } from 'react-native';
import type { OverlayProps } from '@/components/overlay-props';
import { radius, space } from '@/constants/layout';
import { useTheme } from '@/hooks/use-theme';

/** What lies over the page and holds the focus until it is closed. Screens use `Sheet` or `Confirm`. */
export function Overlay({ open, onClose, title, place, children }: OverlayProps) {
  const { colours } = useTheme();
  return (
    <Modal
      visible={open}
      transparent
      onRequestClose={onClose}
      animationType={place === 'edge' ? 'slide' : 'fade'}
    >
      <Pressable
        aria-label="Close"
        onPress={onClose}
        style={{
          flex: 1,
          justifyContent: place === 'edge' ? 'flex-end' : 'center',
          backgroundColor: '#0008',
        }}
      >
        <Pressable>
          <View
            aria-label={title}
            style={{
              padding: space.page,
              gap: space.medium,
              borderRadius: radius.sheet,
              backgroundColor: colours.sheet,
            }}
          >
            {children}
          </View>
        </Pressable>
      </Pressable>
    </Modal>
  );
}
