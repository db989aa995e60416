import { View, type ViewStyle } from 'react-native';

export type ShapeName = 'triangle' | 'square' | 'diamond' | 'cross' | 'ring' | 'dot' | 'bar';

const bar = (colour: string, turn: string): ViewStyle => ({
  position: 'absolute',
  width: 15,
  height: 2.5,
  borderRadius: 1,
  backgroundColor: colour,
  transform: [{ rotate: turn }],
});

function drawn(name: ShapeName, colour: string) {
  switch (name) {
    case 'triangle':
      return (
        <View
          style={{
            borderLeftWidth: 6.5,
            borderRightWidth: 6.5,
            borderBottomWidth: 12,
            borderLeftColor: 'transparent',
            borderRightColor: 'transparent',
            borderBottomColor: colour,
          }}
        />
      );
    case 'square':
      return <View style={{ width: 11, height: 11, backgroundColor: colour }} />;
    case 'diamond':
      return (
        <View
          style={{ width: 9.5, height: 9.5, backgroundColor: colour, transform: [{ rotate: '45deg' }] }}
        />
      );
    case 'cross':
      return (
        <>
          <View style={bar(colour, '45deg')} />
          <View style={bar(colour, '-45deg')} />
        </>
      );
    case 'ring':
      return (
        <View style={{ width: 12, height: 12, borderRadius: 6, borderWidth: 2.5, borderColor: colour }} />
      );
    case 'dot':
      return <View style={{ width: 11, height: 11, borderRadius: 6, backgroundColor: colour }} />;
    case 'bar':
      return <View style={bar(colour, '0deg')} />;
  }
}

/** A small drawn shape. It never stands without a word beside it, so a screen reader passes it by. */
export function Shape({ name, colour }: { name: ShapeName; colour: string }) {
  return (
    <View aria-hidden style={{ width: 16, height: 16, alignItems: 'center', justifyContent: 'center' }}>
      {drawn(name, colour)}
    </View>
  );
}
