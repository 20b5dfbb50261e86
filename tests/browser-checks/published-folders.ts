/** Folders of Debian packages with published tables. */
export const PUBLISHED = ['/usr/share/colord', '/usr/share/color/argyll/ref']
