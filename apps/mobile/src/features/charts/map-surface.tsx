import { StyleSheet, View } from 'react-native';
import { SvgXml } from 'react-native-svg';
import { fromPage } from '@mereward/shared/charts/drawing/view';
import { type MapSurfaceProps, OVERSCAN } from './map-surface-props';

/** The map on a phone's own system: a tap reads it; the buttons beside it move and scale it. */
export function MapSurface({ layers, fixed, view, label, onTap }: MapSurfaceProps) {
  const place = {
    position: 'absolute',
    left: -view.widthPx * OVERSCAN,
    top: -view.heightPx * OVERSCAN,
  } as const;
  return (
    <View
      role="img"
      aria-label={label}
      style={[StyleSheet.absoluteFill, { overflow: 'hidden' }]}
      onStartShouldSetResponder={() => true}
      onResponderRelease={({ nativeEvent }) =>
        onTap(fromPage(view, nativeEvent.locationX, nativeEvent.locationY))
      }
    >
      {layers.map((svg, i) => (
        <View key={i} pointerEvents="none" style={place}>
          <SvgXml xml={svg} />
        </View>
      ))}
      <View pointerEvents="none" style={StyleSheet.absoluteFill}>
        <SvgXml xml={fixed} />
      </View>
    </View>
  );
}
