/** A batch that was made: measured, judged, corrected. Start with {@link org.hazewright.desk.batch.BatchView}. */
package org.hazewright.desk.batch;
