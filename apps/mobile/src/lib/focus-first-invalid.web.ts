/** Puts the focus on the first field that is marked wrong, once the marks are drawn. */
export function focusFirstInvalid(): void {
  requestAnimationFrame(() => {
    document.querySelector<HTMLElement>('[aria-invalid="true"]')?.focus();
  });
}
