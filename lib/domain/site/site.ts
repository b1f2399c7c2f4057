export interface SiteRecord {
  readonly siteId: string;
  readonly name: string;
  readonly accessionMask: string;
}
