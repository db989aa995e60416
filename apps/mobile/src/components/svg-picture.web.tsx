import type { SvgPictureProps } from './svg-picture-props';

/** A drawing of ours set into the page. The text is made by our own writer, which escapes every word it is given. */
export function SvgPicture({ svg, label }: SvgPictureProps) {
  const naming = label ? { role: 'img', 'aria-label': label } : { 'aria-hidden': true };
  return <div {...naming} style={{ lineHeight: 0 }} dangerouslySetInnerHTML={{ __html: svg }} />;
}
