import { View } from 'react-native';
import { SvgXml } from 'react-native-svg';
import type { SvgPictureProps } from './svg-picture-props';

/** A drawing of ours on a phone's own system. */
export function SvgPicture({ svg, label }: SvgPictureProps) {
  return (
    <View {...(label ? { role: 'img', 'aria-label': label } : { 'aria-hidden': true })}>
      <SvgXml xml={svg} />
    </View>
  );
}
