import { defineStore } from 'pinia'
import * as api from '../api/customers.api'

/** Customers: whose sites these are. */
export const useCustomersStore = defineStore('customers', () => ({
  list: api.listCustomers,
  get: api.getCustomer,
  create: api.createCustomer,
  change: api.changeCustomer,
}))
