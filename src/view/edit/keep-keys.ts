// Keys pressed while something is typed belong to what is typed into; the sheet around does not move by them.
//
// Commands with Control or Command that the field has no use for go on to the page, and Tab leaves as everywhere.
// Not here: what the keys do.

export function keepKeys(event: KeyboardEvent) {
  const isCommand = event.ctrlKey || event.metaKey;
  if (event.key === 'Tab' || (isCommand && !event.defaultPrevented && !/^[zyacvx]$/iu.test(event.key))) return;
  event.stopPropagation();
}
