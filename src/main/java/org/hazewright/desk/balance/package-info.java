/** At the balance: one step at a time, in type that is read from a metre away. Start with {@link org.hazewright.desk.balance.BalanceView}. */
package org.hazewright.desk.balance;
