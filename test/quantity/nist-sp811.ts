// Conversion factors of NIST Special Publication 811 (2008), Appendix B.8 and B.9.
//
// `printed` is what the publication prints, seven digits unless it is exact. `full` was derived from the exact definitions
// it gives: in = 0.0254 m, lb = 0.453 592 37 kg, g_n = 9.806 65 m/s², Btu(IT) = 1055.055 852 62 J, US gallon = 231 in³,
// cal(th) = 4.184 J, with decimal and rational arithmetic outside this program; where it does not end, it is cut (`cut`)
// after twenty digits.
// Left out: revolution and r/min to rad and rad/s, which are no conversion of units here (counted.test.ts).

export interface PublishedFactor {
  readonly unit: string;
  readonly si: string;
  readonly printed: string;
  readonly full: string;
  readonly cut?: true;
}

export const publishedFactors: readonly PublishedFactor[] = [
  { unit: 'in', si: 'm', printed: '2.54 E-02', full: '0.0254' },
  { unit: 'ft', si: 'm', printed: '3.048 E-01', full: '0.3048' },
  { unit: 'yd', si: 'm', printed: '9.144 E-01', full: '0.9144' },
  { unit: 'nmi', si: 'm', printed: '1.852 E+03', full: '1852' },
  { unit: 'mil', si: 'm', printed: '2.54 E-05', full: '2.54E-5' },
  { unit: 'µin', si: 'm', printed: '2.54 E-08', full: '2.54E-8' },
  { unit: 'in²', si: 'm²', printed: '6.4516 E-04', full: '0.00064516' },
  { unit: 'ft²', si: 'm²', printed: '9.290 304 E-02', full: '0.09290304' },
  { unit: 'yd²', si: 'm²', printed: '8.361 274 E-01', full: '0.83612736' },
  { unit: 'cmil', si: 'm²', printed: '5.067 075 E-10', full: '5.0670747909749775143E-10', cut: true },
  { unit: 'in³', si: 'm³', printed: '1.638 706 E-05', full: '1.6387064E-5' },
  { unit: 'ft³', si: 'm³', printed: '2.831 685 E-02', full: '0.028316846592' },
  { unit: 'gal_UK', si: 'm³', printed: '4.546 09 E-03', full: '0.00454609' },
  { unit: 'qt', si: 'm³', printed: '9.463 529 E-04', full: '0.000946352946' },
  { unit: 'bbl', si: 'm³', printed: '1.589 873 E-01', full: '0.158987294928' },
  { unit: 'oz', si: 'kg', printed: '2.834 952 E-02', full: '0.028349523125' },
  { unit: 'grain', si: 'kg', printed: '6.479 891 E-05', full: '6.479891E-5' },
  { unit: 'slug', si: 'kg', printed: '1.459 390 E+01', full: '14.593902937206364829', cut: true },
  { unit: 'ton_long', si: 'kg', printed: '1.016 047 E+03', full: '1016.0469088' },
  { unit: 't', si: 'kg', printed: '1.0 E+03', full: '1000' },
  { unit: 'lbf', si: 'N', printed: '4.448 222 E+00', full: '4.4482216152605' },
  { unit: 'kip', si: 'N', printed: '4.448 222 E+03', full: '4448.2216152605' },
  { unit: 'ozf', si: 'N', printed: '2.780 139 E-01', full: '0.27801385095378125' },
  { unit: 'pdl', si: 'N', printed: '1.382 550 E-01', full: '0.138254954376' },
  { unit: 'dyn', si: 'N', printed: '1.0 E-05', full: '1E-5' },
  { unit: 'lbf·ft', si: 'N·m', printed: '1.355 818 E+00', full: '1.3558179483314004' },
  { unit: 'lbf·in', si: 'N·m', printed: '1.129 848 E-01', full: '0.1129848290276167' },
  { unit: 'ozf·in', si: 'N·m', printed: '7.061 552 E-03', full: '0.00706155181422604375' },
  { unit: 'atm', si: 'Pa', printed: '1.013 25 E+05', full: '101325' },
  { unit: 'at', si: 'Pa', printed: '9.806 65 E+04', full: '98066.5' },
  { unit: 'psi', si: 'Pa', printed: '6.894 757 E+03', full: '6894.7572931683613367', cut: true },
  { unit: 'ksi', si: 'Pa', printed: '6.894 757 E+06', full: '6894757.2931683613367', cut: true },
  { unit: 'Torr', si: 'Pa', printed: '1.333 224 E+02', full: '133.32236842105263158', cut: true },
  { unit: 'inHg', si: 'Pa', printed: '3.386 389 E+03', full: '3386.388640341' },
  { unit: 'inH2O', si: 'Pa', printed: '2.490 889 E+02', full: '249.08891' },
  { unit: 'ftH2O', si: 'Pa', printed: '2.989 067 E+03', full: '2989.06692' },
  { unit: 'Btu', si: 'J', printed: '1.055 056 E+03', full: '1055.05585262' },
  { unit: 'Btu_th', si: 'J', printed: '1.054 350 E+03', full: '1054.3502644888888889', cut: true },
  { unit: 'cal', si: 'J', printed: '4.184 E+00', full: '4.184' },
  { unit: 'kW·h', si: 'J', printed: '3.6 E+06', full: '3600000' },
  { unit: 'ft·lbf', si: 'J', printed: '1.355 818 E+00', full: '1.3558179483314004' },
  { unit: 'erg', si: 'J', printed: '1.0 E-07', full: '1E-7' },
  { unit: 'hp', si: 'W', printed: '7.456 999 E+02', full: '745.69987158227022' },
  { unit: 'hp_metric', si: 'W', printed: '7.354 988 E+02', full: '735.49875' },
  { unit: 'hp_electric', si: 'W', printed: '7.46 E+02', full: '746' },
  { unit: 'TR', si: 'W', printed: '3.516 853 E+03', full: '3516.8528420666666667', cut: true },
  { unit: 'ft·lbf/s', si: 'W', printed: '1.355 818 E+00', full: '1.3558179483314004' },
  { unit: 'ft·lbf/min', si: 'W', printed: '2.259 697 E-02', full: '0.02259696580552334' },
  { unit: 'mi/h', si: 'm/s', printed: '4.4704 E-01', full: '0.44704' },
  { unit: 'ft/s', si: 'm/s', printed: '3.048 E-01', full: '0.3048' },
  { unit: 'km/h', si: 'm/s', printed: '2.777 778 E-01', full: '0.27777777777777777778', cut: true },
  { unit: 'g_n', si: 'm/s²', printed: '9.806 65 E+00', full: '9.80665' },
  { unit: 'Gal', si: 'm/s²', printed: '1.0 E-02', full: '0.01' },
  { unit: '°', si: 'rad', printed: '1.745 329 E-02', full: '0.017453292519943295769', cut: true },
  { unit: '″', si: 'rad', printed: '4.848 137 E-06', full: '4.8481368110953599359E-6', cut: true },
  { unit: 'gon', si: 'rad', printed: '1.570 796 E-02', full: '0.015707963267948966192', cut: true },
  { unit: 'min', si: 's', printed: '6.0 E+01', full: '60' },
  { unit: 'h', si: 's', printed: '3.6 E+03', full: '3600' },
  { unit: 'lb/h', si: 'kg/s', printed: '1.259 979 E-04', full: '0.00012599788055555555556', cut: true },
  { unit: 'lb/ft', si: 'kg/m', printed: '1.488 164 E+00', full: '1.4881639435695538058', cut: true },
  { unit: 'lb/in', si: 'kg/m', printed: '1.785 797 E+01', full: '17.857967322834645669', cut: true },
  { unit: 'St', si: 'm²/s', printed: '1.0 E-04', full: '0.0001' },
  { unit: 'ft³/min', si: 'm³/s', printed: '4.719 474 E-04', full: '0.0004719474432' },
];
