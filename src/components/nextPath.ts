/** Where to go after signing in: a path of our own, or the rack. Anything that could lead elsewhere is ignored. */
export function nextPath(wanted: string | null): string {
  if (!wanted || !/^\/[A-Za-z0-9_~-][A-Za-z0-9_~/?=&.-]*$/.test(wanted) || wanted.includes('//'))
    return '/lessons';
  return wanted;
}
