/** How the axial length was measured. Optical and ultrasound cases never share a constant. */
export type MeasurementOrigin = 'optical' | 'ultrasound';
