/** Words of the sun path. */
export const sunPathWords = {
  sunPath: {
    tab: 'Sun path',
    label: 'Sun path',
    projection: 'Projection',
    stereographic: 'Stereographic',
    altitudeAzimuth: 'Altitude over azimuth',
    mask: (window: string) => `Sky hidden from ${window}`,
    maskNone: 'Select a window or a point to see what hides its sky.',
    maskOf: (id: string, isWindow: boolean) => (isWindow ? `window ${id}` : id),
    larger: 'Larger…',
    close: 'Close',
    save: 'Save drawing',
    svg: 'This drawing (SVG)',
    pdf: 'Both drawings (PDF, A4)',
    fileName: 'sun path',
    working: 'Drawing the sun path…',
    canvas:
      'The sun’s paths over the sky of the site. Pointing sets the moment; left and right arrows move it by days, up and down by ten minutes.',
    reading: (when: string, sun: string) => `${when}: ${sun}`,
    sun: (altitude: string, azimuth: string) => `sun ${altitude} high, azimuth ${azimuth}`,
    down: 'the sun is down',
  },
} as const;
