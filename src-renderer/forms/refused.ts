/** Whether a form holds a field that was not taken; the first of them gets the focus. */
export function refused(form: EventTarget | null): boolean {
  if (!(form instanceof HTMLFormElement)) return false;
  const first = form.querySelector<HTMLElement>('[aria-invalid="true"]');
  first?.focus();
  return first !== null;
}
