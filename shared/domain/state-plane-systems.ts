import type { CoordinateSystem } from './coordinate-systems.ts'

/** State plane systems of several states, in US survey feet, international feet and metres. */
export const STATE_PLANE_SYSTEMS: readonly Omit<CoordinateSystem, 'datum'>[] = [
  {
    code: 'EPSG:2223',
    name: 'NAD83 / Arizona Central (ft)',
    proj4:
      '+proj=tmerc +lat_0=31 +lon_0=-111.916666666667 +k=0.9999 +x_0=213360 +y_0=0 +ellps=GRS80 +towgs84=0,0,0 +units=ft +no_defs',
    unit: 'ft',
  },
  {
    code: 'EPSG:2227',
    name: 'NAD83 / California zone 3 (ftUS)',
    proj4:
      '+proj=lcc +lat_0=36.5 +lon_0=-120.5 +lat_1=38.4333333333333 +lat_2=37.0666666666667 +x_0=2000000.0001016 +y_0=500000.0001016 +ellps=GRS80 +towgs84=0,0,0 +units=us-ft +no_defs',
    unit: 'us-ft',
  },
  {
    code: 'EPSG:26944',
    name: 'NAD83 / California zone 4',
    proj4:
      '+proj=lcc +lat_0=35.3333333333333 +lon_0=-119 +lat_1=37.25 +lat_2=36 +x_0=2000000 +y_0=500000 +ellps=GRS80 +towgs84=0,0,0 +units=m +no_defs',
    unit: 'm',
  },
  {
    code: 'EPSG:2229',
    name: 'NAD83 / California zone 5 (ftUS)',
    proj4:
      '+proj=lcc +lat_0=33.5 +lon_0=-118 +lat_1=35.4666666666667 +lat_2=34.0333333333333 +x_0=2000000.0001016 +y_0=500000.0001016 +ellps=GRS80 +towgs84=0,0,0 +units=us-ft +no_defs',
    unit: 'us-ft',
  },
  {
    code: 'EPSG:2232',
    name: 'NAD83 / Colorado Central (ftUS)',
    proj4:
      '+proj=lcc +lat_0=37.8333333333333 +lon_0=-105.5 +lat_1=39.75 +lat_2=38.45 +x_0=914401.828803657 +y_0=304800.609601219 +ellps=GRS80 +towgs84=0,0,0 +units=us-ft +no_defs',
    unit: 'us-ft',
  },
  {
    code: 'EPSG:2236',
    name: 'NAD83 / Florida East (ftUS)',
    proj4:
      '+proj=tmerc +lat_0=24.3333333333333 +lon_0=-81 +k=0.999941177 +x_0=200000.0001016 +y_0=0 +ellps=GRS80 +towgs84=0,0,0 +units=us-ft +no_defs',
    unit: 'us-ft',
  },
  {
    code: 'EPSG:2240',
    name: 'NAD83 / Georgia West (ftUS)',
    proj4:
      '+proj=tmerc +lat_0=30 +lon_0=-84.1666666666667 +k=0.9999 +x_0=699999.999898399 +y_0=0 +ellps=GRS80 +towgs84=0,0,0 +units=us-ft +no_defs',
    unit: 'us-ft',
  },
  {
    code: 'EPSG:3435',
    name: 'NAD83 / Illinois East (ftUS)',
    proj4:
      '+proj=tmerc +lat_0=36.6666666666667 +lon_0=-88.3333333333333 +k=0.999975 +x_0=300000 +y_0=0 +ellps=GRS80 +towgs84=0,0,0 +units=us-ft +no_defs',
    unit: 'us-ft',
  },
  {
    code: 'EPSG:26982',
    name: 'NAD83 / Louisiana South',
    proj4:
      '+proj=lcc +lat_0=28.5 +lon_0=-91.3333333333333 +lat_1=30.7 +lat_2=29.3 +x_0=1000000 +y_0=0 +ellps=GRS80 +towgs84=0,0,0 +units=m +no_defs',
    unit: 'm',
  },
  {
    code: 'EPSG:2248',
    name: 'NAD83 / Maryland (ftUS)',
    proj4:
      '+proj=lcc +lat_0=37.6666666666667 +lon_0=-77 +lat_1=39.45 +lat_2=38.3 +x_0=399999.9998984 +y_0=0 +ellps=GRS80 +towgs84=0,0,0 +units=us-ft +no_defs',
    unit: 'us-ft',
  },
  {
    code: 'EPSG:2251',
    name: 'NAD83 / Michigan North (ft)',
    proj4:
      '+proj=lcc +lat_0=44.7833333333333 +lon_0=-87 +lat_1=47.0833333333333 +lat_2=45.4833333333333 +x_0=7999999.999968 +y_0=0 +ellps=GRS80 +towgs84=0,0,0 +units=ft +no_defs',
    unit: 'ft',
  },
  {
    code: 'EPSG:26997',
    name: 'NAD83 / Missouri Central',
    proj4:
      '+proj=tmerc +lat_0=35.8333333333333 +lon_0=-92.5 +k=0.999933333 +x_0=500000 +y_0=0 +ellps=GRS80 +towgs84=0,0,0 +units=m +no_defs',
    unit: 'm',
  },
  {
    code: 'EPSG:32104',
    name: 'NAD83 / Nebraska',
    proj4:
      '+proj=lcc +lat_0=39.8333333333333 +lon_0=-100 +lat_1=43 +lat_2=40 +x_0=500000 +y_0=0 +ellps=GRS80 +towgs84=0,0,0 +units=m +no_defs',
    unit: 'm',
  },
  {
    code: 'EPSG:2263',
    name: 'NAD83 / New York Long Island (ftUS)',
    proj4:
      '+proj=lcc +lat_0=40.1666666666667 +lon_0=-74 +lat_1=41.0333333333333 +lat_2=40.6666666666667 +x_0=300000 +y_0=0 +ellps=GRS80 +towgs84=0,0,0 +units=us-ft +no_defs',
    unit: 'us-ft',
  },
  {
    code: 'EPSG:2264',
    name: 'NAD83 / North Carolina (ftUS)',
    proj4:
      '+proj=lcc +lat_0=33.75 +lon_0=-79 +lat_1=36.1666666666667 +lat_2=34.3333333333333 +x_0=609601.219202438 +y_0=0 +ellps=GRS80 +towgs84=0,0,0 +units=us-ft +no_defs',
    unit: 'us-ft',
  },
  {
    code: 'EPSG:2992',
    name: 'NAD83 / Oregon GIC Lambert (ft)',
    proj4:
      '+proj=lcc +lat_0=41.75 +lon_0=-120.5 +lat_1=43 +lat_2=45.5 +x_0=399999.9999984 +y_0=0 +ellps=GRS80 +towgs84=0,0,0 +units=ft +no_defs',
    unit: 'ft',
  },
  {
    code: 'EPSG:2269',
    name: 'NAD83 / Oregon North (ft)',
    proj4:
      '+proj=lcc +lat_0=43.6666666666667 +lon_0=-120.5 +lat_1=46 +lat_2=44.3333333333333 +x_0=2500000.0001424 +y_0=0 +ellps=GRS80 +towgs84=0,0,0 +units=ft +no_defs',
    unit: 'ft',
  },
  {
    code: 'EPSG:2272',
    name: 'NAD83 / Pennsylvania South (ftUS)',
    proj4:
      '+proj=lcc +lat_0=39.3333333333333 +lon_0=-77.75 +lat_1=40.9666666666667 +lat_2=39.9333333333333 +x_0=600000 +y_0=0 +ellps=GRS80 +towgs84=0,0,0 +units=us-ft +no_defs',
    unit: 'us-ft',
  },
  {
    code: 'EPSG:2273',
    name: 'NAD83 / South Carolina (ft)',
    proj4:
      '+proj=lcc +lat_0=31.8333333333333 +lon_0=-81 +lat_1=34.8333333333333 +lat_2=32.5 +x_0=609600 +y_0=0 +ellps=GRS80 +towgs84=0,0,0 +units=ft +no_defs',
    unit: 'ft',
  },
  {
    code: 'EPSG:2277',
    name: 'NAD83 / Texas Central (ftUS)',
    proj4:
      '+proj=lcc +lat_0=29.6666666666667 +lon_0=-100.333333333333 +lat_1=31.8833333333333 +lat_2=30.1166666666667 +x_0=699999.999898399 +y_0=3000000 +ellps=GRS80 +towgs84=0,0,0 +units=us-ft +no_defs',
    unit: 'us-ft',
  },
  {
    code: 'EPSG:32140',
    name: 'NAD83 / Texas South Central',
    proj4:
      '+proj=lcc +lat_0=27.8333333333333 +lon_0=-99 +lat_1=30.2833333333333 +lat_2=28.3833333333333 +x_0=600000 +y_0=4000000 +ellps=GRS80 +towgs84=0,0,0 +units=m +no_defs',
    unit: 'm',
  },
  {
    code: 'EPSG:2278',
    name: 'NAD83 / Texas South Central (ftUS)',
    proj4:
      '+proj=lcc +lat_0=27.8333333333333 +lon_0=-99 +lat_1=30.2833333333333 +lat_2=28.3833333333333 +x_0=600000 +y_0=3999999.9998984 +ellps=GRS80 +towgs84=0,0,0 +units=us-ft +no_defs',
    unit: 'us-ft',
  },
  {
    code: 'EPSG:2285',
    name: 'NAD83 / Washington North (ftUS)',
    proj4:
      '+proj=lcc +lat_0=47 +lon_0=-120.833333333333 +lat_1=48.7333333333333 +lat_2=47.5 +x_0=500000.0001016 +y_0=0 +ellps=GRS80 +towgs84=0,0,0 +units=us-ft +no_defs',
    unit: 'us-ft',
  },
  {
    code: 'EPSG:2286',
    name: 'NAD83 / Washington South (ftUS)',
    proj4:
      '+proj=lcc +lat_0=45.3333333333333 +lon_0=-120.5 +lat_1=47.3333333333333 +lat_2=45.8333333333333 +x_0=500000.0001016 +y_0=0 +ellps=GRS80 +towgs84=0,0,0 +units=us-ft +no_defs',
    unit: 'us-ft',
  },
]
