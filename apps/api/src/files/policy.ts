/** Who adds photos to a fishery's pages and takes them away. */
export const PHOTO_KEEPERS = ['owner', 'manager', 'head_bailiff'] as const;
/** Who sees a photo that waits or was refused. */
export const PHOTO_STAFF = ['owner', 'manager', 'head_bailiff', 'bailiff', 'office'] as const;
