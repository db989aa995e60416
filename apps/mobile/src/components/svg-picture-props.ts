export type SvgPictureProps = {
  svg: string;
  /** What a screen reader says; without it the picture is passed by, for words beside it say the same. */
  label?: string | undefined;
};
