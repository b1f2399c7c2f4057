/**
 * Every source a formula, default or check in lib/physics leans on.
 * 'read': somebody of this project had the text (or its abstract) open. 'from memory': cited as remembered, to be checked.
 */
export interface Reference {
  readonly key: string;
  readonly authors: string;
  readonly year: number;
  readonly title: string;
  /** Journal with volume, or publisher. */
  readonly where: string;
  readonly pages: string;
  readonly standing: 'read' | 'from memory';
}

export const REFERENCES: readonly Reference[] = [
  {
    key: 'bernstein-2004',
    authors: 'Bernstein MA, King KF, Zhou XJ',
    year: 2004,
    title: 'Handbook of MRI Pulse Sequences',
    where: 'Elsevier Academic Press',
    pages: 'chapters on phase encoding, slab selection and parallel imaging',
    standing: 'from memory',
  },
  {
    key: 'graves-2013',
    authors: 'Graves MJ, Mitchell DG',
    year: 2013,
    title: "Body MRI artifacts in clinical practice: a physicist's and radiologist's perspective",
    where: 'J Magn Reson Imaging 38',
    pages: '269–287',
    standing: 'from memory',
  },
  {
    key: 'griswold-2004',
    authors: 'Griswold MA, Kannengiesser S, Heidemann RM, Wang J, Jakob PM',
    year: 2004,
    title: 'Field-of-view limitations in parallel imaging',
    where: 'Magn Reson Med 52',
    pages: '1118–1126 (abstract)',
    standing: 'read',
  },
  {
    key: 'goldfarb-2004',
    authors: 'Goldfarb JW',
    year: 2004,
    title: 'The SENSE ghost: field-of-view restrictions for SENSE imaging',
    where: 'J Magn Reson Imaging 20',
    pages: '1046–1051',
    standing: 'from memory',
  },
  {
    key: 'pruessmann-1999',
    authors: 'Pruessmann KP, Weiger M, Scheidegger MB, Boesiger P',
    year: 1999,
    title: 'SENSE: sensitivity encoding for fast MRI',
    where: 'Magn Reson Med 42',
    pages: '952–962',
    standing: 'from memory',
  },
  {
    key: 'uecker-2014',
    authors: 'Uecker M, Lai P, Murphy MJ, Virtue P, Elad M, Pauly JM, Vasanawala SS, Lustig M',
    year: 2014,
    title: 'ESPIRiT: an eigenvalue approach to autocalibrating parallel MRI',
    where: 'Magn Reson Med 71',
    pages: '990–1001',
    standing: 'from memory',
  },
  {
    key: 'pauly-1989',
    authors: 'Pauly J, Nishimura D, Macovski A',
    year: 1989,
    title: 'A k-space analysis of small-tip-angle excitation',
    where: 'J Magn Reson 81',
    pages: '43–56',
    standing: 'from memory',
  },
  {
    key: 'pauly-1991',
    authors: 'Pauly J, Le Roux P, Nishimura D, Macovski A',
    year: 1991,
    title: 'Parameter relations for the Shinnar–Le Roux selective excitation pulse design algorithm',
    where: 'IEEE Trans Med Imaging 10',
    pages: '53–65',
    standing: 'from memory',
  },
  {
    key: 'edelstein-1986',
    authors: 'Edelstein WA, Glover GH, Hardy CJ, Redington RW',
    year: 1986,
    title: 'The intrinsic signal-to-noise ratio in NMR imaging',
    where: 'Magn Reson Med 3',
    pages: '604–618',
    standing: 'from memory',
  },
  {
    key: 'macovski-1996',
    authors: 'Macovski A',
    year: 1996,
    title: 'Noise in MRI',
    where: 'Magn Reson Med 36',
    pages: '494–497',
    standing: 'from memory',
  },
  {
    key: 'noll-1991',
    authors: 'Noll DC, Nishimura DG, Macovski A',
    year: 1991,
    title: 'Homodyne detection in magnetic resonance imaging',
    where: 'IEEE Trans Med Imaging 10',
    pages: '154–163',
    standing: 'from memory',
  },
  {
    key: 'kahn-2014',
    authors: 'Kahn HS, Gu Q, Bullard KM, Freedman DS, Ahluwalia N, Ogden CL',
    year: 2014,
    title:
      'Population distribution of the sagittal abdominal diameter (SAD) from a representative sample of US adults',
    where: 'PLoS One 9',
    pages: 'e108707',
    standing: 'read',
  },
  {
    key: 'nhanes-2013',
    authors: 'Centers for Disease Control and Prevention, National Center for Health Statistics',
    year: 2016,
    title: 'National Health and Nutrition Examination Survey 2013–2016, body measures',
    where: 'public data files',
    pages: 'BMX',
    standing: 'read',
  },
  {
    key: 'ansur-2',
    authors: 'Gordon CC and others',
    year: 2014,
    title: '2012 Anthropometric Survey of U.S. Army Personnel: methods and summary statistics',
    where: 'Natick Soldier Research, Development and Engineering Center',
    pages: 'public data files',
    standing: 'read',
  },
  {
    key: 'heinz-2003',
    authors: 'Heinz G, Peterson LJ, Johnson RW, Kerk CJ',
    year: 2003,
    title: 'Exploring relationships in body dimensions',
    where: 'J Stat Educ 11(2)',
    pages: 'data set "body"',
    standing: 'read',
  },
  {
    key: 'ramanujan-1914',
    authors: 'Ramanujan S',
    year: 1914,
    title: 'Modular equations and approximations to π',
    where: 'Quart J Math 45',
    pages: '350–372 (second perimeter approximation)',
    standing: 'from memory',
  },
  {
    key: 'dicom-ps3',
    authors: 'National Electrical Manufacturers Association',
    year: 2024,
    title: 'Digital Imaging and Communications in Medicine (DICOM), PS3.3 and PS3.6',
    where: 'NEMA',
    pages: 'MR Image Module; Percent Phase Field of View, Percent Sampling; patient coordinate system',
    standing: 'from memory',
  },
  {
    key: 'codata-2018',
    authors: 'Tiesinga E, Mohr PJ, Newell DB, Taylor BN',
    year: 2021,
    title: 'CODATA recommended values of the fundamental physical constants: 2018',
    where: 'Rev Mod Phys 93',
    pages: '025010 (proton gyromagnetic ratio)',
    standing: 'from memory',
  },
  {
    key: 'ernst-1966',
    authors: 'Ernst RR, Anderson WA',
    year: 1966,
    title: 'Application of Fourier transform spectroscopy to magnetic resonance',
    where: 'Rev Sci Instrum 37',
    pages: '93–102',
    standing: 'from memory',
  },
];
