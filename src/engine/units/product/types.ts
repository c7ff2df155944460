export interface ProductSettings {
  readonly to?: 'process' | 'atmosphere' | 'storage';
}
