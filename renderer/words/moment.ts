/** Words of the clock. */
export const momentWords = {
  moment: {
    label: 'Moment',
    date: 'Date',
    time: 'Time',
    timeOfDay: 'Time of day',
    presets: 'Solstices and equinoxes',
    preset: {
      marchEquinox: 'March equinox',
      juneSolstice: 'June solstice',
      septemberEquinox: 'September equinox',
      decemberSolstice: 'December solstice',
    },
    earlierDay: 'A day earlier',
    laterDay: 'A day later',
    badTime: 'A time of day such as 15:30',
    sunUp: (altitude: string, azimuth: string) => `sun ${altitude} up, bearing ${azimuth}`,
    sunDown: (azimuth: string, altitude: string) => `sun down (${altitude}), bearing ${azimuth}`,
    sunrise: (time: string) => `sunrise ${time}`,
    sunset: (time: string) => `sunset ${time}`,
    neverRises: 'the sun does not rise',
    neverSets: 'the sun does not set',
  },
} as const;
